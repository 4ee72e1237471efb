import type { Ticks } from '../score/score';
import type { Key } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import type { Pitch } from '../theory/pitch';
import type { Role } from '../theory/chord';
import type { TendencyKind } from '../theory/tendencies';

export const LABEL_STATES = ['suggested', 'accepted', 'changed'] as const;
export type LabelState = (typeof LABEL_STATES)[number];

/** Key regions tile the excerpt: no gap, no overlap. */
export interface KeyRegion {
  readonly start: Ticks;
  readonly end: Ticks;
  readonly key: Key;
}

/**
 * Labels tile the excerpt: no gap, no overlap, sorted. A label's key is that of the region its start lies in.
 * `numeral` is null for a blank: asked of a student, not yet filled in, or no harmony (silence).
 */
export interface Label {
  /** Opaque, unique in the reading; made by whoever makes the label, never by lib/harmony's maths. */
  readonly id: string;
  readonly start: Ticks;
  readonly end: Ticks;
  readonly key: Key;
  readonly numeral: Numeral | null;
  readonly state: LabelState;
  /** The engine's certainty 0–1 for this label when it is its proposal; null when a person wrote it. */
  readonly certainty: number | null;
  /** The engine's runners-up for the span, best first. */
  readonly others: readonly OtherReading[];
  /** Kinds that a person gave to notes of the span, against what would be said of them; absent where none was given. */
  readonly tones?: readonly MarkedTone[] | undefined;
  /** A person reads the label in the key that begins after it as well. */
  readonly pivot?: boolean | undefined;
}

export interface MarkedTone {
  /** A note of the score, by its id. */
  readonly noteId: number;
  readonly kind: NonChordKind;
}

export interface OtherReading {
  readonly key: Key;
  readonly numeral: Numeral;
  readonly certainty: number;
}

export interface Reading {
  readonly start: Ticks;
  readonly end: Ticks;
  readonly regions: readonly KeyRegion[];
  readonly labels: readonly Label[];
}

export const NON_CHORD_KINDS = [
  'passing',
  'neighbour',
  'double-neighbour',
  'appoggiatura',
  'escape',
  'anticipation',
  'suspension',
  'retardation',
  'pedal',
  'other',
] as const;
export type NonChordKind = (typeof NON_CHORD_KINDS)[number];

export interface ChordTone {
  readonly noteId: number;
  readonly pitch: Pitch;
  readonly role: Role;
  /** The pitch is enharmonically the chord's tone but spelled otherwise. */
  readonly misspelled: boolean;
}

export interface NonChordTone {
  readonly noteId: number;
  readonly pitch: Pitch;
  readonly kind: NonChordKind;
  readonly from: Pitch | null;
  readonly to: Pitch | null;
}

export const RESOLUTIONS = ['as-expected', 'in-another-voice', 'delayed', 'irregular', 'unresolved'] as const;
export type Resolution = (typeof RESOLUTIONS)[number];

/** A tone that wants to move: the leading tone up a half step, a seventh down by step, altered notes the way they lean. */
export interface TendencyTone {
  readonly noteId: number;
  readonly pitch: Pitch;
  readonly kind: TendencyKind;
  /** Pitch class where it should go, as Fifths in `expected`; and where its voice went. */
  readonly expected: Pitch;
  readonly went: Pitch | null;
  readonly wentNoteId: number | null;
  readonly resolution: Resolution;
  /** What it wants and why, as a sentence. */
  readonly reason: string;
}

/** One readable term of the engine's sum for a label: positive speaks for it. */
export interface Term {
  /** A short stable name of the term, e.g. `root-present`. */
  readonly name: string;
  /** The term as a teacher would say it. */
  readonly sentence: string;
  readonly weight: number;
}

/** The evidence for a label. Sentences are for people, in a teacher's words. */
export interface Why {
  readonly chordTones: readonly ChordTone[];
  readonly missing: readonly Role[];
  readonly nonChordTones: readonly NonChordTone[];
  readonly tendencyTones: readonly TendencyTone[];
  /** Strongest first. */
  readonly termsFor: readonly Term[];
  readonly termsAgainst: readonly Term[];
  readonly sentences: readonly string[];
}
