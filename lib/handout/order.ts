import type { Reading } from '../harmony/reading';
import type { Score } from '../score/score';
import type { ConventionSheet } from '../theory/conventions';

export const PAPERS = ['A4', 'Letter'] as const;
export type Paper = (typeof PAPERS)[number];

/** Hundredths of a millimetre. */
export const PAPER_SIZES: Readonly<Record<Paper, { readonly width: number; readonly height: number }>> = {
  A4: { width: 21000, height: 29700 },
  Letter: { width: 21590, height: 27940 },
};

/** `worksheet` prints blanks under the asked spans; `key` prints every label. */
export const HANDOUT_KINDS = ['worksheet', 'key'] as const;
export type HandoutKind = (typeof HANDOUT_KINDS)[number];

export const STAFF_SIZES = ['small', 'normal', 'large'] as const;
export type StaffSize = (typeof STAFF_SIZES)[number];

/** Height of a staff in print: 5.6, 6.6 and 7.6 mm. */
export const STAFF_SCALES: Readonly<Record<StaffSize, number>> = { small: 0.78, normal: 0.92, large: 1.06 };

/** What a person chooses and writes for a handout. Texts may be empty. */
export interface HandoutTexts {
  readonly title: string;
  /** Composer and work. */
  readonly byline: string;
  readonly course: string;
  readonly instructions: string;
  /** Source of the score and its rights statement. */
  readonly source: string;
}

export interface HandoutOrder extends HandoutTexts {
  readonly paper: Paper;
  readonly kind: HandoutKind;
  readonly staffSize: StaffSize;
  /** Print the keys; otherwise a worksheet asks for the first. A key always prints them. */
  readonly keysGiven: boolean;
  readonly conventions: ConventionSheet;
  /** Partwise MusicXML text, and what was read from it. */
  readonly xml: string;
  readonly score: Score;
  /** Bar indexes, inclusive; the reading's labels lie within. */
  readonly firstBar: number;
  readonly lastBar: number;
  readonly reading: Reading;
  /** Ids of the labels that a worksheet asks for. */
  readonly asked: ReadonlySet<string>;
}
