import type { Label } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { layoutNumeral } from '@/lib/theory/numeral-layout';
import { measureRun } from '@/lib/theory/numeral-metrics';
import type { Numeral } from '@/lib/theory/numeral';
import { type NumeralParts, typesetAfter } from '@/lib/theory/typeset';
import { NumeralText } from './numeral-text';

/** Size of the lanes' numerals, in engraving pixels to the em. */
export const NUMERAL_SIZE = 22;
/** Narrower labels are still this wide to a pointer. */
const LEAST_WIDTH = 26;

/** What a label prints: null for a blank. `previous` is the numeral before it, whose figures it may complete. */
export function faceOf(label: Label, previous: Numeral | null, sheet: ConventionSheet): NumeralParts | null {
  return label.numeral && typesetAfter(previous, label.numeral, label.key.mode, sheet);
}

/** Natural width of a face in engraving pixels. */
export function faceWidth(parts: NumeralParts | null): number {
  return Math.max(LEAST_WIDTH, parts ? layoutNumeral(parts, measureRun).width * NUMERAL_SIZE + 2 : 0);
}

/** The numeral, or the dotted box of a blank. */
export function LabelFace({ parts }: { readonly parts: NumeralParts | null }) {
  if (!parts) return <span className="inline-block h-[20px] w-[24px] border border-dotted border-current opacity-70" />;
  return <NumeralText parts={parts} decorative />;
}
