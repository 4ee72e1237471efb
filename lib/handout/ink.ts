import { type Face, type FontName, type Ruler, runsOf } from './fonts';

/** Small pieces of SVG. Lengths in hundredths of a millimetre, y downwards, text on its baseline. */
export interface Ink {
  readonly svg: string;
  readonly width: number;
}

export function escapeXml(text: string): string {
  return text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c] as string);
}

function number(value: number): string {
  return String(Math.round(value * 10) / 10);
}

export function glyphs(text: string, font: FontName | Face, size: number, x: number, y: number): string {
  return `<text x="${number(x)}" y="${number(y)}" font-family="${font}" font-size="${number(size)}">${escapeXml(text)}</text>`;
}

export interface Place {
  readonly x: number;
  readonly y: number;
}

/** A line of text from its left edge; accidentals and other scripts are set from the fonts that have them. */
export function line(ruler: Ruler, text: string, face: Face, size: number, place: Place): Ink {
  let x = place.x;
  const svg = runsOf(text, face).map((run) => {
    // SVG drops spaces at the start of a text: they are stepped over instead.
    const text = run.text.trimStart();
    x += ruler(run.text.slice(0, run.text.length - text.length), face, size);
    const drawn = glyphs(text, run.font, size, x, place.y);
    x += ruler(text, face, size);
    return drawn;
  });
  return { svg: svg.join(''), width: x - place.x };
}

/** The same, ending at `place.x`. */
export function lineEndingAt(ruler: Ruler, text: string, face: Face, size: number, place: Place): Ink {
  return line(ruler, text, face, size, { x: place.x - ruler(text, face, size), y: place.y });
}

export function rule(from: Place, to: Place, thickness: number): string {
  const [x1, y1, x2, y2] = [from.x, from.y, to.x, to.y].map(number);
  return `<path d="M${x1} ${y1} L${x2} ${y2}" stroke="#000" stroke-width="${number(thickness)}" fill="none"/>`;
}

/** Breaks a paragraph into lines no wider than `width`; a word wider than that stands alone. Line ends in the text are kept. */
export function wrap(ruler: Ruler, text: string, face: Face, size: number, width: number): string[] {
  return text.split(/\r?\n/).flatMap((paragraph) => wrapParagraph(ruler, paragraph.split(/\s+/), face, size, width));
}

function wrapParagraph(ruler: Ruler, words: readonly string[], face: Face, size: number, width: number): string[] {
  const lines: string[] = [];
  let current = '';
  for (const word of words) {
    const longer = current === '' ? word : `${current} ${word}`;
    if (current !== '' && ruler(longer, face, size) > width) {
      lines.push(current);
      current = word;
    } else current = longer;
  }
  return [...lines, current];
}
