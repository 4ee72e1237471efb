import type { KeyRegion, Label } from '../harmony/reading';
import type { Key } from '../theory/key';
import type { Numeral } from '../theory/numeral';

/** Whole ticks from the start of the score, as in the reading it comes from. */
export type Moment = Label['start'];

/** A numeral and the local key it is read in: together they name a chord. */
export interface Framed {
  readonly key: Key;
  readonly numeral: Numeral;
}

/** A label of the answer key. Asked labels must have a numeral; `alternatives` are taken as right beside it. */
export interface KeyLabel {
  readonly id: string;
  readonly start: Moment;
  readonly end: Moment;
  readonly key: Key;
  readonly numeral: Numeral | null;
  readonly asked: boolean;
  readonly alternatives: readonly Framed[];
  /** Full marks for this label; null: the rubric's. */
  readonly points: number | null;
}

/** The reading that marks are given against. Labels and regions tile it, as in every reading. */
export interface KeyReading {
  readonly start: Moment;
  readonly end: Moment;
  readonly regions: readonly KeyRegion[];
  readonly labels: readonly KeyLabel[];
}

/** What one assignment asks of one label, beside the reading itself. */
export interface Asked {
  readonly labelId: string;
  readonly points: number | null;
  readonly alternatives: readonly Framed[];
}
