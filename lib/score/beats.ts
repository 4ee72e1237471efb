import { midiOf } from '../theory/pitch';
import { beatStarts, metricalLevel } from './metre';
import { type Note, type Score, type Ticks, ticks } from './score';
import type { MetricalLevel } from './sonority';

/** A note's share in a beat: how long it sounds there, and whether it begins there. */
export interface BeatNote {
  readonly note: Note;
  readonly sounds: Ticks;
  readonly attacked: boolean;
}

/**
 * One felt beat of a bar and all that sounds in it: the view in which a broken chord is one chord. Beats tile the score
 * from its first to its last bar.
 */
export interface Beat {
  readonly start: Ticks;
  readonly end: Ticks;
  readonly bar: number;
  readonly level: MetricalLevel;
  /** From the bass up; silent beats have none. */
  readonly notes: readonly BeatNote[];
}

/** The beat's view of the sonorities. */
export function sliceBeats(score: Score): Beat[] {
  const frames = score.bars.flatMap((bar) => {
    const starts = beatStarts(score, bar).map((at) => ({ at, start: bar.start + at, bar }));
    return starts.map((frame, i) => ({ ...frame, end: starts[i + 1]?.start ?? bar.start + bar.length }));
  });
  const walk = new NotesOverTime(score.notes);
  return frames
    .filter(({ start, end }) => end > start)
    .map(({ at, start, end, bar }) => ({
      start: ticks(start),
      end: ticks(end),
      bar: bar.index,
      level: metricalLevel(score, bar, at),
      notes: walk.between(start, end).map((note) => shareOf(note, start, end)),
    }));
}

function shareOf(note: Note, start: number, end: number): BeatNote {
  const sounds = Math.min(end, note.start + note.duration) - Math.max(start, note.start);
  return { note, sounds: ticks(sounds), attacked: note.start >= start };
}

class NotesOverTime {
  private next = 0;
  private held: Note[] = [];

  constructor(private readonly notes: readonly Note[]) {}

  /** Notes that sound in the span, from the bass up; spans must come in order. */
  between(start: number, end: number): Note[] {
    for (let note = this.notes[this.next]; note && note.start < end; note = this.notes[this.next]) {
      this.held.push(note);
      this.next += 1;
    }
    this.held = this.held.filter((note) => note.start + note.duration > start);
    return [...this.held].sort((a, b) => midiOf(a.pitch) - midiOf(b.pitch) || a.id - b.id);
  }
}
