import type { Label } from '@/lib/harmony/reading';
import type { Note, Score } from '@/lib/score/score';
import type { Key } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { midiOf, pitchClassOf } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';

/** What is to be heard, in quarter notes from its beginning: neither tempo nor sound is known here. */
export interface PlayList {
  /** Sorted by `at`. */
  readonly tones: readonly PlayedTone[];
  readonly length: number;
  /** The music's moments in order, for a cursor; empty when nothing of the score goes by. */
  readonly moments: readonly { readonly at: number; readonly tick: number }[];
}

export interface PlayedTone {
  /** MIDI key number, 60 for middle C. */
  readonly midi: number;
  readonly at: number;
  readonly length: number;
  /** 0–1. */
  readonly loudness: number;
  /** Null for a chord that stands on no staff. */
  readonly staff: StaffId | null;
}

/** A staff of a part, `0.1`: the part's place, the staff within it. */
export type StaffId = `${number}.${number}`;

export function staffOf({ part, staff }: Pick<Note, 'part' | 'staff'>): StaffId {
  return `${part}.${staff}`;
}

/** The span [start, end) in ticks. */
export interface Passage {
  readonly start: number;
  readonly end: number;
}

/** A note let go a little early is heard apart from the same note struck again. */
const RELEASE = 0.04;
const SHORTEST = 0.06;

/** The notes of a passage as written. A note held into the passage is struck at its beginning. */
export function playScore(score: Score, { start, end }: Passage): PlayList {
  const quarter = score.ticksPerQuarter;
  const heard = score.notes.filter((n) => n.start < end && n.start + n.duration > start);
  const tones = heard.map((note): PlayedTone => {
    const from = Math.max(note.start, start);
    const until = Math.min(note.start + note.duration, end);
    return { midi: midiOf(note.pitch), at: (from - start) / quarter, length: lasting((until - from) / quarter), loudness: 0.7, staff: staffOf(note) };
  });
  return { tones: sorted(tones), length: (end - start) / quarter, moments: momentsOf(score, start, end) };
}

function lasting(quarters: number): number {
  return Math.max(SHORTEST, quarters - RELEASE);
}

function sorted(tones: readonly PlayedTone[]): PlayedTone[] {
  return [...tones].sort((a, b) => a.at - b.at || a.midi - b.midi);
}

function momentsOf(score: Score, start: number, end: number): PlayList['moments'] {
  const ticks = new Set([start, ...score.notes.filter((n) => n.start >= start && n.start < end).map((n) => n.start as number)]);
  return [...ticks].sort((a, b) => a - b).map((tick) => ({ tick, at: (tick - start) / score.ticksPerQuarter }));
}

/** The bass sounds between these, the rest of the chord closely above it and not under the second. */
const LOWEST_BASS = 41;
const LOWEST_UPPER = 55;

/** A numeral as a block chord, from the bass up, close above; MIDI key numbers. */
export function voiceChord(key: Key, numeral: Numeral): number[] {
  const [bass, ...rest] = spellNumeral(key, numeral).tones.map((tone) => pitchClassOf(tone.fifths));
  if (bass === undefined) return [];
  const low = nextAbove(bass, LOWEST_BASS);
  let floor = Math.max(low + 1, LOWEST_UPPER);
  const upper = rest.map((pitchClass) => (floor = nextAbove(pitchClass, floor)));
  return [low, ...upper];
}

/** The lowest key at or above `floor` of a pitch class (0 for C). */
function nextAbove(pitchClass: number, floor: number): number {
  return floor + ((((pitchClass - floor) % 12) + 12) % 12);
}

/** Labels one after another as block chords, each as long as its span within the passage; blanks are silent. */
export function playReduction(score: Score, labels: readonly Label[], { start, end }: Passage): PlayList {
  const quarter = score.ticksPerQuarter;
  const within = labels.filter((l) => l.start < end && l.end > start);
  const tones = within.flatMap((label) => {
    const from = Math.max(label.start, start);
    const length = lasting((Math.min(label.end, end) - from) / quarter);
    const chord = label.numeral ? voiceChord(label.key, label.numeral) : [];
    return chord.map((midi): PlayedTone => ({ midi, at: (from - start) / quarter, length, loudness: 0.6, staff: null }));
  });
  const moments = within.map((label) => ({ tick: Math.max(label.start, start), at: (Math.max(label.start, start) - start) / quarter }));
  return { tones: sorted(tones), length: (end - start) / quarter, moments };
}

const CHORD_QUARTERS = 2;

/** One chord, held for two quarters. */
export function playChord(key: Key, numeral: Numeral): PlayList {
  const tones = voiceChord(key, numeral).map((midi): PlayedTone => ({ midi, at: 0, length: CHORD_QUARTERS - 0.4, loudness: 0.6, staff: null }));
  return { tones, length: CHORD_QUARTERS, moments: [] };
}
