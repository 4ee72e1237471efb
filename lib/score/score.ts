import type { Pitch } from '../theory/pitch';

/**
 * Time in a score: whole ticks from the score's first sounding position, 0-based. One quarter note is
 * `Score.ticksPerQuarter` ticks, chosen per score so that every written duration is a whole number of them (the least
 * common multiple of the file's divisions). No floating point anywhere in time.
 */
export type Ticks = number & { readonly unit: 'ticks' };

export function ticks(value: number): Ticks {
  return value as Ticks;
}

/**
 * One `<measure>` of the first part, in file order; repeats are not played out, split bars not joined.
 * Bars tile the score: bars[i].start + bars[i].length === bars[i + 1].start.
 */
export interface Bar {
  /** 0-based place in file order. */
  readonly index: number;
  /** The number as printed: `1`, `12a`, `X1`, or '' where there is none. */
  readonly number: string;
  readonly start: Ticks;
  /** Actual length: the longest part's; an upbeat is short. */
  readonly length: Ticks;
  /** The time signature in force, null for senza misura. */
  readonly time: TimeSignature | null;
  /** The bar is outside the count (an upbeat, the second half of a split bar). */
  readonly implicit: boolean;
  /** Ticks missing before the first note when the bar is an upbeat or the rest of a split bar; 0 otherwise. */
  readonly offset: Ticks;
}

export interface TimeSignature {
  /** The numerators as written: [3, 2] for 3+2/8, [6] for 6/8. Several signatures (3/8+2/4) are given one after another. */
  readonly beats: readonly number[];
  readonly beatType: number;
  /** Where it takes effect; a mid-bar change has its own position. */
  readonly start: Ticks;
}

/**
 * A sign that changes the order in which bars are played, as written; `performedBars` plays it out.
 * It stands at the start or the end of its bar.
 */
export interface PlayOrderSign {
  readonly bar: number;
  readonly at: 'start' | 'end';
  readonly kind: PlayOrderKind;
  /** `repeat-end`: how often the passage is played in all (2 unless written otherwise). */
  readonly times: number;
  /** `ending-start` and `ending-end`: for which passes, 1-based; empty for an ending without number. */
  readonly passes: readonly number[];
}

export const PLAY_ORDER_KINDS = [
  'repeat-start',
  'repeat-end',
  'ending-start',
  'ending-end',
  'segno',
  'coda',
  'da-capo',
  'dal-segno',
  'to-coda',
  'fine',
] as const;
export type PlayOrderKind = (typeof PLAY_ORDER_KINDS)[number];

/** A key signature as written, at concert pitch: sharps positive, flats negative; weak evidence only. */
export interface KeySignature {
  readonly start: Ticks;
  readonly fifths: number;
  readonly mode: 'major' | 'minor' | null;
}

/**
 * A sounding note: ties merged (`duration` is the whole), at concert pitch with its right spelling. Grace notes, cue
 * notes and unpitched notes are not among them.
 */
export interface Note {
  /** Unique in the score, stable for the same file: its place in `Score.notes`. */
  readonly id: number;
  readonly pitch: Pitch;
  readonly start: Ticks;
  readonly duration: Ticks;
  /** 0-based part, in file order. */
  readonly part: number;
  /** 1-based staff within the part, as written for the note. */
  readonly staff: number;
  /** The voice as written in the file (`'1'`, `'2'`…); unique only within part. */
  readonly voice: string;
  /** Where each written (tied) note of it starts, the first included: what an engraver draws. */
  readonly attacks: readonly Ticks[];
}

/** A grace note, attached to the note it ornaments; it does not sound in a sonority. */
export interface GraceNote {
  readonly pitch: Pitch;
  /** The main note's id, null when none follows in its voice and bar. */
  readonly mainNote: number | null;
  readonly start: Ticks;
}

export interface Part {
  readonly index: number;
  readonly id: string;
  readonly name: string;
  readonly staves: number;
}

/** Something read on the side that a person should know: rounded microtones, a bar too long for its signature. */
export interface ScoreWarning {
  readonly code: string;
  readonly message: string;
  readonly line?: number;
  readonly bar?: number;
}

export interface Score {
  /** Of the movement where the file names one, or else of the work; '' where there is none. */
  readonly title: string;
  /** The larger work the movement belongs to, '' where the file names none. */
  readonly work: string;
  readonly composer: string;
  readonly ticksPerQuarter: number;
  readonly parts: readonly Part[];
  readonly bars: readonly Bar[];
  /** Sorted by start, then by part, staff and height from below. */
  readonly notes: readonly Note[];
  readonly graceNotes: readonly GraceNote[];
  readonly keySignatures: readonly KeySignature[];
  /** Every change of metre, mid-bar ones included, sorted. */
  readonly timeSignatures: readonly TimeSignature[];
  /** Repeats, endings, da capo: kept as written. */
  readonly playOrder: readonly PlayOrderSign[];
  readonly warnings: readonly ScoreWarning[];
}

/** Why a file was refused. `line` is 1-based in the XML text. `message` is a sentence for people: place and what to do. */
export interface ScoreError {
  readonly code: ScoreErrorCode;
  readonly message: string;
  readonly line?: number;
  readonly element?: string;
}

export const SCORE_ERROR_CODES = [
  'not_musicxml',
  'xml_broken',
  'xml_entities',
  'xml_too_deep',
  'encoding_unknown',
  'file_too_large',
  'zip_broken',
  'zip_bomb',
  'zip_too_many_entries',
  'zip_no_score',
  'zip_bad_path',
  'score_empty',
  'score_too_long',
  'bad_divisions',
  'bad_duration',
  'bad_backup',
  'bad_note',
  'duplicate_part',
  'timed_out',
  'out_of_memory',
] as const;
export type ScoreErrorCode = (typeof SCORE_ERROR_CODES)[number];
