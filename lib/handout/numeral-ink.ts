import type { ConventionSheet } from '../theory/conventions';
import type { Mode } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { layoutNumeral } from '../theory/numeral-layout';
import { glyphsOf, measureRun, type PlacedGlyph } from '../theory/numeral-metrics';
import { typesetAfter, typesetNumeral } from '../theory/typeset';
import type { Face } from './fonts';
import { glyphs, type Ink } from './ink';

/** Size of a numeral's letters: 4.4 mm, about 12.5 points. */
export const NUMERAL_SIZE = 440;

/** A numeral set in type, its baseline at 0 and its left edge at 0. `previous` is the label before it, for figures that follow on. */
export function setNumeral(numeral: Numeral, previous: Numeral | null, mode: Mode, sheet: ConventionSheet): Ink {
  const parts = previous ? typesetAfter(previous, numeral, mode, sheet) : typesetNumeral(numeral, mode, sheet);
  const layout = layoutNumeral(parts, measureRun);
  return { svg: layout.runs.flatMap(glyphsOf).map(drawGlyph).join(''), width: layout.width * NUMERAL_SIZE };
}

function faceOf(glyph: PlacedGlyph): Face {
  if (glyph.kind === 'sign') return 'signs';
  return glyph.small ? 'figures' : 'numeral';
}

function drawGlyph(glyph: PlacedGlyph): string {
  return glyphs(glyph.text, faceOf(glyph), glyph.size * NUMERAL_SIZE, glyph.x * NUMERAL_SIZE, glyph.y * NUMERAL_SIZE);
}
