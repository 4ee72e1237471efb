import type { Quality } from './chord';
import type { Degree, Mode } from './key';

/** What an applied chord points at: a degree of the key it is read in, tonicised in `mode`. */
export interface Target {
  readonly degree: Degree;
  readonly mode: Mode;
}

/** Chords whose numeral alone does not say what they are. */
export const SPECIALS = [
  'cadential-six-four',
  'passing-six-four',
  'pedal-six-four',
  'arpeggiated-six-four',
  'neapolitan',
  'common-tone',
  'pedal-tone',
] as const;
export type Special = (typeof SPECIALS)[number];

export const ADDED_TONES = ['sus2', 'sus4', 'add4', 'add6', 'add9'] as const;
export type AddedTone = (typeof ADDED_TONES)[number];

/**
 * A Roman numeral as a value.
 * `degree` is the root's degree, read in the key of `applied[0]` when there is one, or else in the local key.
 * `applied` is the chain of targets, nearest first: V7/V/ii in C is [{step 5, major}, {step 2, minor}]: the 5th of the
 * key of ii, tonicised. Each target's degree is read in the key of the next one; the last in the local key.
 * The cadential six-four is the tonic triad (degree 1, inversion 2) with its special, however a convention prints it.
 * Augmented sixths: degree {4, +1} for Italian and German (root the raised fourth), {2, 0} for French; the usual
 * position, flat sixth in the bass, is inversion 1, 1 and 2.
 * The major triad on the lowered second (and its major seventh) is always `neapolitan`. The common-tone °7 is spelled
 * on the raised second of the key it embellishes, degree {2, +1}. `pedal-tone` is the held tone alone, quality `other`.
 * `added`: tones over the plain chord, in the order of ADDED_TONES, each diatonic in the key of `applied[0]` or the
 * local key; `sus` tones stand for the third. The ninth of a dominant is part of the quality.
 */
export interface Numeral {
  readonly degree: Degree;
  readonly quality: Quality;
  readonly inversion: 0 | 1 | 2 | 3 | 4;
  readonly applied: readonly Target[];
  readonly special: Special | null;
  readonly added: readonly AddedTone[];
}

export type { Mode };
