import type { Key } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import type { Ticks } from './score';

/** A chord read in a key. */
export interface KeyedNumeral {
  readonly key: Key;
  readonly numeral: Numeral;
}

/**
 * One label of an analysis as it is written into a score or read from one: where it begins, in ticks of the Score that
 * is read from the same file, its key and numeral, and alternatives that count as right beside it.
 */
export interface Annotation {
  readonly start: Ticks;
  readonly key: Key;
  /** null where there is no harmony: what stands before ends here. */
  readonly numeral: Numeral | null;
  readonly alternatives?: readonly KeyedNumeral[];
}
