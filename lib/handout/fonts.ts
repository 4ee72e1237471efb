import { createRequire } from 'node:module';
import path from 'node:path';
import PDFDocument from 'pdfkit';

/**
 * The faces of a handout. `numeral` is the face of numerals' letters and `figures` the same with its own small figures;
 * `signs` holds the accidentals, which the text faces lack; `engraver` the musical signs within an engraver's texts.
 */
export const FACES = ['book', 'book-italic', 'book-bold', 'sans', 'sans-bold', 'numeral', 'figures', 'signs', 'engraver'] as const;
export type Face = (typeof FACES)[number];

/** The text faces come in one file per script; a run of text is set from the file that has its letters. */
const SCRIPTS = ['latin', 'latin-ext', 'greek', 'cyrillic'] as const;
type Script = (typeof SCRIPTS)[number];

/** A face in one script, as it is registered with the PDF writer: `book`, `book.greek`, `signs`. */
export type FontName = string & { readonly unit: 'font' };

/** Faces that come in one file for all scripts. */
type SingleFace = 'signs' | 'engraver';

const WEIGHTS: Readonly<Record<Exclude<Face, SingleFace>, { readonly family: string; readonly style: string }>> = {
  book: { family: 'alegreya', style: '400-normal' },
  'book-italic': { family: 'alegreya', style: '400-italic' },
  'book-bold': { family: 'alegreya', style: '700-normal' },
  sans: { family: 'alegreya-sans', style: '400-normal' },
  'sans-bold': { family: 'alegreya-sans', style: '700-normal' },
  numeral: { family: 'alegreya', style: '500-normal' },
  figures: { family: 'alegreya', style: '500-normal' },
};

const from = createRequire(path.join(process.cwd(), 'package.json'));

function pathInPackage(name: string, file: string): string {
  return path.join(path.dirname(from.resolve(`${name}/package.json`)), file);
}

/** PDF fonts are .woff and .otf files: the PDF writer cannot finish a document with .woff2 fonts. */
function pathOfFont(face: Face, script: Script): string {
  if (face === 'signs') return path.join(process.cwd(), 'app/fonts/understave-signs.otf');
  if (face === 'engraver') return pathInPackage('@vexflow-fonts/bravuratext', 'bravuratext.otf');
  const { family, style } = WEIGHTS[face];
  return pathInPackage(`@fontsource/${family}`, `files/${family}-${script}-${style}.woff`);
}

function isSingle(face: Face): face is SingleFace {
  return face === 'signs' || face === 'engraver';
}

function fontName(face: Face, script: Script): FontName {
  return (isSingle(face) || script === 'latin' ? face : `${face}.${script}`) as FontName;
}

/** What the PDF writer keeps of an open font; its declarations leave it out. */
interface OpenFont {
  encode(text: string, features?: readonly string[]): unknown;
  widthOfString(text: string, size: number, features?: readonly string[]): number;
}

/** Registers every face with a PDF document. Fonts that are not used leave nothing in the file. */
export function registerFaces(doc: PDFKit.PDFDocument): void {
  for (const face of FACES) {
    for (const script of isSingle(face) ? (['latin'] as const) : SCRIPTS) doc.registerFont(fontName(face, script), pathOfFont(face, script));
  }
  setFeature(doc, 'numeral', 'lnum');
  setFeature(doc, 'figures', 'dnom');
}

/** The SVG-to-PDF writer passes no OpenType features on: the face itself asks for lining or small figures. */
function setFeature(doc: PDFKit.PDFDocument, face: Face, feature: 'lnum' | 'dnom'): void {
  const font = (doc.font(face) as unknown as { readonly _font: OpenFont })._font;
  const [encode, widthOfString] = [font.encode.bind(font), font.widthOfString.bind(font)];
  font.encode = (text) => encode(text, [feature]);
  font.widthOfString = (text, size) => widthOfString(text, size, [feature]);
}

/** A stretch of text that one font has the letters of. */
export interface TextRun {
  readonly text: string;
  readonly font: FontName;
}

/** Unicode's musical signs that the text faces lack: ♭ ♮ ♯ and the double flat and sharp. */
const SIGN = /[\u266D-\u266F\u{1D12A}\u{1D12B}]/u;
const SCRIPT_RANGES: readonly (readonly [Script, RegExp])[] = [
  ['latin-ext', /[\u0100-\u02AF\u1E00-\u1EFF]/],
  ['greek', /[\u0370-\u03FF]/],
  ['cyrillic', /[\u0400-\u04FF]/],
];

/** Parts a text into runs by font. */
export function runsOf(text: string, face: Face): TextRun[] {
  const runs: { text: string; font: FontName }[] = [];
  for (const character of text) {
    const font = fontOf(character, face);
    const last = runs.at(-1);
    if (last?.font === font) last.text += character;
    else runs.push({ text: character, font });
  }
  return runs;
}

function fontOf(character: string, face: Face): FontName {
  if (SIGN.test(character)) return fontName('signs', 'latin');
  return fontName(face, SCRIPT_RANGES.find(([, range]) => range.test(character))?.[0] ?? 'latin');
}

/** Width of a text set in a face at a size, in the unit of the size. */
export type Ruler = (text: string, face: Face, size: number) => number;

/** A ruler with the real metrics of the shipped faces. */
export function createRuler(): Ruler {
  const doc = new PDFDocument({ autoFirstPage: false });
  registerFaces(doc);
  const widthOfRun = (run: TextRun) => doc.font(run.font).fontSize(1000).widthOfString(run.text) / 1000;
  return (text, face, size) => size * runsOf(text, face).reduce((sum, run) => sum + widthOfRun(run), 0);
}
