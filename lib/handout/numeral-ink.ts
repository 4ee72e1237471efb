import type { ConventionSheet } from '../theory/conventions';
import type { Mode } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { layoutNumeral, type NumeralRun, type RunKind } from '../theory/numeral-layout';
import { typesetAfter, typesetNumeral } from '../theory/typeset';
import type { Face, Ruler } from './fonts';
import { glyphs, type Ink } from './ink';

/** Size of a numeral's letters: 4.4 mm, about 12.5 points. */
export const NUMERAL_SIZE = 440;

const FACE_OF_KIND: Readonly<Record<RunKind, Face>> = {
  letters: 'book',
  name: 'book',
  sign: 'signs',
  mark: 'book',
  figure: 'figures',
  word: 'sans',
  joint: 'book',
};

/** A numeral set in type, its baseline at 0 and its left edge at 0. `previous` is the label before it, for figures that follow on. */
export function setNumeral(numeral: Numeral, previous: Numeral | null, mode: Mode, sheet: ConventionSheet, ruler: Ruler): Ink {
  const parts = previous ? typesetAfter(previous, numeral, mode, sheet) : typesetNumeral(numeral, mode, sheet);
  const layout = layoutNumeral(parts, (text, kind, size) => ruler(text, FACE_OF_KIND[kind], size));
  return { svg: layout.runs.map(drawRun).join(''), width: layout.width * NUMERAL_SIZE };
}

function drawRun(run: NumeralRun): string {
  return glyphs(run.text, FACE_OF_KIND[run.kind], run.size * NUMERAL_SIZE, run.x * NUMERAL_SIZE, run.y * NUMERAL_SIZE);
}
