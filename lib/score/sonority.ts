import type { Note, Ticks } from './score';

/** 0 downbeat, 1 half-bar (or the secondary accent of the metre), 2 beat, 3 half-beat, 4 anything finer. */
export type MetricalLevel = 0 | 1 | 2 | 3 | 4;

/** What sounds from one onset to the next. Sonorities tile the score from its first to its last note; `sounding` may be empty. */
export interface Sonority {
  readonly start: Ticks;
  readonly end: Ticks;
  readonly bar: number;
  readonly level: MetricalLevel;
  /** Sounding notes from the bass up. */
  readonly sounding: readonly Note[];
  /** Those of `sounding` that start here, from the bass up. */
  readonly attacked: readonly Note[];
}
