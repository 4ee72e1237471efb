import type { Pitch } from '../theory/pitch';
import { ROUNDING_PER_QUARTER } from './bars';
import type { Draft, WrittenNote } from './draft';
import type { Bar } from './score';

/** A sounding note before it has its id: times in ticks from the start of the score. */
export interface PlacedNote {
  readonly pitch: Pitch;
  readonly start: number;
  duration: number;
  readonly part: number;
  readonly staff: number;
  readonly voice: string;
  readonly attacks: number[];
  /** Places in `Draft.notes` of the written notes it is made of. */
  readonly written: number[];
}

/**
 * Written notes → sounding notes. A note that ends a tie lengthens the note of the same part and spelled pitch that
 * begins one: the one that ends where it starts, in the same voice before any other; or else the last one that ended
 * earlier in the same bar or the bar before (a broken chord whose notes are tied into a full one), unless that pitch
 * was struck again meanwhile. A tie that leads nowhere (into a second ending, let-ring) joins nothing. Ties between
 * different spellings join nothing: spelling is kept.
 */
export function mergeTies(draft: Draft, bars: readonly Bar[]): PlacedNote[] {
  const placed: PlacedNote[] = [];
  const open = new Map<string, OpenTie[]>();
  for (const index of orderInTime(draft, bars)) {
    const written = draft.notes[index] as WrittenNote;
    const bar = bars[written.bar] as Bar;
    const start = bar.start + Math.min(written.at, bar.length);
    const duration = bar.start + endInBar(draft, written, bar) - start;
    // A hair of a note at the end of a rounded bar is nothing.
    if (duration <= 0) continue;
    const joined = written.tieStop ? takeOpen(open, written, start) : undefined;
    if (!written.tieStop) dropStruckAgain(open, written, start);
    const note = joined ? lengthen(joined, start, duration, index) : place(written, start, duration, index);
    if (!joined) placed.push(note);
    if (written.tieStart) keepOpen(open, written, note);
  }
  return placed;
}

function orderInTime(draft: Draft, bars: readonly Bar[]): number[] {
  const startOf = (index: number) => {
    const { bar, at } = draft.notes[index] as WrittenNote;
    return (bars[bar] as Bar).start + at;
  };
  return draft.notes.map((_, index) => index).sort((a, b) => startOf(a) - startOf(b) || a - b);
}

/** In a bar whose sum was rounded, the last notes end with the bar. */
function endInBar(draft: Draft, { at, duration }: WrittenNote, bar: Bar): number {
  const end = at + duration;
  const written = draft.bars[bar.index]?.length;
  if (written === bar.length) return end;
  return Math.abs(end - bar.length) * ROUNDING_PER_QUARTER <= draft.ticksPerQuarter ? bar.length : end;
}

function place({ pitch, part, staff, voice }: WrittenNote, start: number, duration: number, index: number): PlacedNote {
  return { pitch, start, duration, part, staff, voice, attacks: [start], written: [index] };
}

function lengthen(note: PlacedNote, start: number, duration: number, index: number): PlacedNote {
  note.duration = start + duration - note.start;
  note.attacks.push(start);
  note.written.push(index);
  return note;
}

function nameOf({ part, pitch }: WrittenNote): string {
  return `${part}/${pitch.fifths}/${pitch.octave}`;
}

/** A note whose tie has not been ended yet, and the bar of its last written note. */
interface OpenTie {
  readonly note: PlacedNote;
  readonly bar: number;
}

function endOf(note: PlacedNote): number {
  return note.start + note.duration;
}

function keepOpen(open: Map<string, OpenTie[]>, written: WrittenNote, note: PlacedNote): void {
  const name = nameOf(written);
  const same = open.get(name);
  if (same) same.push({ note, bar: written.bar });
  else open.set(name, [{ note, bar: written.bar }]);
}

function takeOpen(open: Map<string, OpenTie[]>, written: WrittenNote, start: number): PlacedNote | undefined {
  const candidates = open.get(nameOf(written)) ?? [];
  const chosen = chooseOpen(candidates, written, start);
  if (chosen) open.set(nameOf(written), candidates.filter((tie) => tie !== chosen));
  return chosen?.note;
}

function chooseOpen(candidates: readonly OpenTie[], written: WrittenNote, start: number): OpenTie | undefined {
  const meeting = candidates.filter(({ note }) => endOf(note) === start);
  const own = meeting.find(({ note }) => note.voice === written.voice && note.staff === written.staff);
  return own ?? meeting[0] ?? candidates.findLast(({ note, bar }) => endOf(note) < start && bar >= written.bar - 1);
}

/** A new stroke of the pitch ends the wait of ties that ended before it. */
function dropStruckAgain(open: Map<string, OpenTie[]>, written: WrittenNote, start: number): void {
  const name = nameOf(written);
  const candidates = open.get(name);
  if (candidates) open.set(name, candidates.filter(({ note }) => endOf(note) >= start));
}
