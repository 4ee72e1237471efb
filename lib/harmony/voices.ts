import { type Note, type Score } from '../score/score';
import { midiOf } from '../theory/pitch';

/**
 * A score's notes by voice, for questions about one note's neighbours. Built once per score. A voice is a part's voice as
 * written; where it has chords, each note's neighbour is the nearest in height.
 */
export interface VoiceIndex {
  /** The nearest note of the voice's previous and next onset; null at the ends and across a rest of more than a quarter. */
  readonly before: (note: Note) => Note | null;
  readonly after: (note: Note) => Note | null;
  /** Notes that sound anywhere in [start, end), by start and then height. */
  readonly soundingIn: (start: number, end: number) => readonly Note[];
}

const known = new WeakMap<Score, VoiceIndex>();

export function indexVoices(score: Score): VoiceIndex {
  const found = known.get(score);
  if (found) return found;
  const index = buildIndex(score);
  known.set(score, index);
  return index;
}

interface Place {
  readonly chords: readonly (readonly Note[])[];
  readonly i: number;
}

function buildIndex(score: Score): VoiceIndex {
  const places = new Map<number, Place>();
  const voices = new Map<string, Note[]>();
  for (const note of score.notes) {
    const key = `${note.part} ${note.voice}`;
    const voice = voices.get(key);
    if (voice) voice.push(note);
    else voices.set(key, [note]);
  }
  for (const notes of voices.values()) {
    const chords = groupByStart(notes);
    chords.forEach((chord, i) => chord.forEach((note) => places.set(note.id, { chords, i })));
  }
  const gap = score.ticksPerQuarter;
  const longest = score.notes.reduce((max, note) => Math.max(max, note.duration), 0);
  return {
    before: (note) => neighbour(places.get(note.id), note, -1, gap),
    after: (note) => neighbour(places.get(note.id), note, 1, gap),
    soundingIn: (start, end) => soundingIn(score.notes, longest, start, end),
  };
}

function groupByStart(notes: readonly Note[]): readonly (readonly Note[])[] {
  const groups: Note[][] = [];
  for (const note of notes) {
    const last = groups.at(-1);
    if (last && last[0]!.start === note.start) last.push(note);
    else groups.push([note]);
  }
  return groups;
}

function neighbour(place: Place | undefined, note: Note, direction: 1 | -1, gap: number): Note | null {
  const chord = place?.chords[place.i + direction];
  const other = chord?.reduce((best, candidate) => (distance(candidate, note) < distance(best, note) ? candidate : best));
  if (!other) return null;
  const [earlier, later] = direction === 1 ? [note, other] : [other, note];
  return later.start - (earlier.start + earlier.duration) <= gap ? other : null;
}

function distance(a: Note, b: Note): number {
  return Math.abs(midiOf(a.pitch) - midiOf(b.pitch));
}

/** Notes are sorted by start; none that starts earlier than the longest note's length before `start` can still sound. */
function soundingIn(notes: readonly Note[], longest: number, start: number, end: number): readonly Note[] {
  const found: Note[] = [];
  for (let i = firstFrom(notes, start - longest); i < notes.length && notes[i]!.start < end; i++) {
    const note = notes[i]!;
    if (note.start + note.duration > start) found.push(note);
  }
  return found;
}

function firstFrom(notes: readonly Note[], time: number): number {
  let low = 0;
  let high = notes.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (notes[middle]!.start < time) low = middle + 1;
    else high = middle;
  }
  return low;
}
