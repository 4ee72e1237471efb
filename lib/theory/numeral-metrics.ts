import type { MeasureRun, NumeralRun, RunKind } from './numeral-layout';
import { SIGN_OUTLINES } from './sign-outlines';

/**
 * Advance widths of Alegreya Medium, in thousandths of an em (tests/unit/theory/numeral-metrics.test.ts reads them from
 * the font file). With them a numeral is laid out without a browser, the same on screen and on paper.
 */
const ADVANCES: Readonly<Record<string, number>> = {
  A: 603, B: 611, C: 621, D: 699, E: 593, F: 521, G: 661, H: 751, I: 363, J: 329, K: 641, L: 517, M: 844,
  N: 723, O: 684, P: 562, Q: 689, R: 625, S: 534, T: 556, U: 670, V: 616, W: 946, X: 667, Y: 564, Z: 573,
  a: 474, b: 510, c: 427, d: 537, e: 454, f: 335, g: 505, h: 538, i: 287, j: 260, k: 506, l: 253, m: 835,
  n: 554, o: 506, p: 532, q: 516, r: 396, s: 405, t: 331, u: 543, v: 455, w: 720, x: 484, y: 454, z: 459,
  '°': 302, 'ø': 506, '+': 506, '?': 364, '/': 329, '–': 575, '-': 368, ' ': 187, '(': 282, ')': 281,
};

/** The face's own small figures (OpenType `dnom`), 0–9: drawn small, not shrunk, so that their stems keep their weight. */
const SMALL_FIGURE_ADVANCES = [353, 256, 339, 300, 322, 297, 319, 295, 331, 319];

/** A small figure is 0.385 em high, a lining one 0.61: set this much larger, it stands a little higher than a shrunk one. */
export const SMALL_FIGURE_SCALE = 1.72;

/** For a sign this face lacks: a figure's width. */
const UNKNOWN_ADVANCE = 500;

export function isSmallFigure(character: string, kind: RunKind): boolean {
  return kind === 'figure' && /^[0-9]$/.test(character);
}

/** Width in ems of a run of a numeral; `measure` of layoutNumeral. No kerning. */
export const measureRun: MeasureRun = (text, kind, size) => {
  const thousandths = [...text].reduce((sum, character) => sum + advanceOf(character, kind), 0);
  return (thousandths / 1000) * size;
};

/** Width of one character in thousandths of the run's size. */
export function advanceOf(character: string, kind: RunKind): number {
  if (isSmallFigure(character, kind)) return (SMALL_FIGURE_ADVANCES[Number(character)] ?? UNKNOWN_ADVANCE) * SMALL_FIGURE_SCALE;
  if (Object.hasOwn(SIGN_OUTLINES, character)) return SIGN_OUTLINES[character as keyof typeof SIGN_OUTLINES].advance;
  return ADVANCES[character] ?? UNKNOWN_ADVANCE;
}

/** A piece of a numeral that one text element sets, in ems as the layout. */
export interface PlacedGlyph {
  readonly text: string;
  readonly kind: RunKind;
  readonly x: number;
  readonly y: number;
  readonly size: number;
  /** Set in the face's small figures. */
  readonly small: boolean;
}

/** A run as what is set in one piece: small figures one by one, everything else whole. */
export function glyphsOf(run: NumeralRun): PlacedGlyph[] {
  if (run.kind !== 'figure') return [{ ...run, small: false }];
  let x = run.x;
  return [...run.text].map((text) => {
    const small = isSmallFigure(text, run.kind);
    const size = small ? run.size * SMALL_FIGURE_SCALE : run.size;
    const glyph = { text, kind: run.kind, x, y: run.y, size, small };
    x += (advanceOf(text, run.kind) / 1000) * run.size;
    return glyph;
  });
}
