import type { NumeralParts } from './typeset';

/**
 * Where each piece of a numeral stands, for whoever draws it: the desk's lanes as SVG or HTML, the handout as SVG for
 * print. Lengths are in ems of the numeral's letters; y grows downwards from the letters' baseline.
 */
export const RUN_KINDS = ['letters', 'name', 'sign', 'mark', 'figure', 'word', 'joint'] as const;
export type RunKind = (typeof RUN_KINDS)[number];

export interface NumeralRun {
  readonly text: string;
  /** `sign` is an accidental and needs a face that has them; `mark` is ° ø +; `word` small text; `joint` the / or "of". */
  readonly kind: RunKind;
  readonly x: number;
  readonly y: number;
  readonly size: number;
}

export interface NumeralLayout {
  readonly runs: readonly NumeralRun[];
  readonly width: number;
  /** Above and below the baseline, both positive. */
  readonly ascent: number;
  readonly descent: number;
}

/** Width of a text in ems, set in the face of its kind at `size` ems. */
export type MeasureRun = (text: string, kind: RunKind, size: number) => number;

/** The drawing under way: runs so far and where the next one starts. */
interface Pen {
  readonly measure: MeasureRun;
  readonly runs: NumeralRun[];
  x: number;
}

const FIGURE_SIZE = 0.56;
const FIGURE_STEP = 0.46;
const RAISED = -0.34;
const THIN = 0.05;

/** Lays a numeral and its targets out on one baseline; figures are stacked or slashed as the parts say. */
export function layoutNumeral(parts: NumeralParts, measure: MeasureRun): NumeralLayout {
  const pen: Pen = { measure, runs: [], x: 0 };
  placeChord(pen, parts);
  for (const target of parts.applied) {
    placeJoint(pen, parts.joint ?? '/');
    placeChord(pen, target);
  }
  const ascent = Math.max(0.72, ...pen.runs.map((run) => -run.y + run.size * 0.72));
  const descent = Math.max(0, ...pen.runs.map((run) => run.y + (run.kind === 'letters' ? 0 : run.size * 0.05)));
  return { runs: pen.runs, width: pen.x, ascent, descent };
}

function placeChord(pen: Pen, parts: NumeralParts): void {
  if (parts.accidental) place(pen, parts.accidental, 'sign', 0.9, -0.06, THIN);
  if (parts.letters) place(pen, parts.letters, parts.isName ? 'name' : 'letters', 1, 0, 0);
  if (parts.mark) place(pen, parts.mark, 'mark', 0.72, RAISED + 0.06, 0);
  if (parts.seventh) place(pen, parts.seventh, 'word', 0.5, RAISED, THIN);
  placeFigures(pen, parts);
  for (const note of parts.notes) placeText(pen, note, 'word', 0.5, RAISED, 0.08);
}

function placeFigures(pen: Pen, parts: NumeralParts): void {
  if (parts.figures.length === 0) return;
  pen.x += THIN;
  if (parts.figureStyle === 'slashed') placeText(pen, parts.figures.join('/'), 'figure', 0.72, 0, 0);
  else placeStack(pen, parts.figures);
  if (parts.runsOn) place(pen, '–', 'figure', FIGURE_SIZE, RAISED + 0.1, THIN);
}

/** A single figure is raised; two straddle the middle of the letters; three and more keep the same step. */
function placeStack(pen: Pen, figures: readonly string[]): void {
  const top = figures.length === 1 ? RAISED : 0.13 - FIGURE_STEP * (figures.length - 1);
  const start = pen.x;
  const ends = figures.map((figure, i) => {
    pen.x = start;
    placeText(pen, figure, 'figure', FIGURE_SIZE, top + FIGURE_STEP * i, 0);
    return pen.x;
  });
  pen.x = Math.max(...ends);
}

function placeJoint(pen: Pen, joint: '/' | 'of'): void {
  if (joint === '/') place(pen, '/', 'joint', 1, 0.04, 0.04, 0.04);
  else place(pen, 'of', 'joint', 0.72, 0, 0.2, 0.2);
}

/** Text that may hold accidentals: those are set from their own face. */
function placeText(pen: Pen, text: string, kind: RunKind, size: number, y: number, before: number): void {
  pen.x += before;
  for (const piece of text.split(/([♭♮♯𝄪𝄫]+)/u)) {
    if (piece !== '') place(pen, piece, /[♭♮♯𝄪𝄫]/u.test(piece) ? 'sign' : kind, size, y, 0);
  }
}

function place(pen: Pen, text: string, kind: RunKind, size: number, y: number, before: number, after = 0): void {
  pen.x += before;
  pen.runs.push({ text, kind, x: pen.x, y, size });
  pen.x += pen.measure(text, kind, size) + after;
}
