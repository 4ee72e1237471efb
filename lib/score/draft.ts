import type { Fifths, Pitch } from '../theory/pitch';
import { gcd, lcm, rational, type Rational } from './rational';
import { refuse } from './refusal';
import type { KeySignature, PlayOrderSign, ScoreWarning } from './score';

/** A place as written: ticks from the start of its bar, in the draft's ticks per quarter. */
interface Placed {
  readonly bar: number;
  readonly part: number;
  at: number;
}

export interface WrittenNote extends Placed {
  duration: number;
  readonly pitch: Pitch;
  readonly staff: number;
  readonly voice: string;
  readonly tieStart: boolean;
  readonly tieStop: boolean;
}

export interface WrittenGrace extends Placed {
  readonly pitch: Pitch;
  readonly voice: string;
  /** Place in `Draft.notes` of the note it ornaments. */
  mainNote: number | null;
}

export interface WrittenKey extends Placed {
  /** 0 for all staves of the part. */
  readonly staff: number;
  readonly fifths: Fifths;
  readonly mode: KeySignature['mode'];
}

export interface WrittenTime extends Placed {
  /** null for senza misura. */
  readonly metre: { readonly beats: readonly number[]; readonly beatType: number } | null;
}

export interface WrittenBar {
  readonly number: string;
  readonly implicit: boolean;
  /** Furthest point any part reaches. */
  length: number;
}

/** Where the reading of a bar stands: `at` the next note, `onset` of the last one (for chords), `top` the furthest point. */
export interface Cursor {
  at: number;
  onset: number | null;
  top: number;
}

/** Finest grid kept: beyond it a file's divisions are nonsense, and sums would leave the exact range of numbers. */
const MAX_TICKS_PER_QUARTER = 100_000_000;
const MAX_WARNINGS = 100;

/**
 * What has been read of a score so far, bar by bar and part by part. Its grid grows as finer durations turn up; all
 * times in it are then scaled along, so that every time is a whole number of ticks at any moment.
 */
export class Draft {
  ticksPerQuarter = 1;
  readonly notes: WrittenNote[] = [];
  readonly graces: WrittenGrace[] = [];
  readonly keys: WrittenKey[] = [];
  readonly times: WrittenTime[] = [];
  readonly bars: WrittenBar[] = [];
  readonly playOrder: PlayOrderSign[] = [];
  readonly warnings: ScoreWarning[] = [];
  readonly cursor: Cursor = { at: 0, onset: null, top: 0 };

  /** Makes `1/denominator` of a quarter a whole number of ticks. */
  refine(denominator: number, line: number): void {
    if (this.ticksPerQuarter % denominator === 0) return;
    const finer = lcm(this.ticksPerQuarter, denominator);
    if (finer > MAX_TICKS_PER_QUARTER) {
      refuse('bad_divisions', `Line ${line}: the divisions of the parts have no usable common grid. Export the file again.`, { line, element: 'divisions' });
    }
    this.scale(finer / this.ticksPerQuarter);
    this.ticksPerQuarter = finer;
  }

  /** Quarter notes → ticks, refining the grid when need be. */
  ticksOf(quarters: Rational, line: number): number {
    const { num, den } = rational(quarters.num, quarters.den);
    this.refine(den, line);
    return num * (this.ticksPerQuarter / den);
  }

  warn(warning: ScoreWarning): void {
    const known = this.warnings.some(({ code, bar }) => code === warning.code && bar === warning.bar);
    if (!known && this.warnings.length < MAX_WARNINGS) this.warnings.push(warning);
  }

  private scale(factor: number): void {
    for (const placed of [this.graces, this.keys, this.times]) for (const one of placed) one.at *= factor;
    for (const note of this.notes) {
      note.at *= factor;
      note.duration *= factor;
    }
    for (const bar of this.bars) bar.length *= factor;
    this.cursor.at *= factor;
    this.cursor.top *= factor;
    if (this.cursor.onset !== null) this.cursor.onset *= factor;
  }
}

/** Quarters as a fraction of a whole metre: 6/8 is 3 quarters. */
export function quartersOfMetre(metre: { beats: readonly number[]; beatType: number }): Rational {
  const count = metre.beats.reduce((sum, beats) => sum + beats, 0);
  return rational((4 * count) / gcd(4 * count, metre.beatType), metre.beatType / gcd(4 * count, metre.beatType));
}
