import { midiOf } from '../theory/pitch';
import { metricalLevel } from './metre';
import { type Bar, type Note, type Score, ticks } from './score';
import type { Sonority } from './sonority';

/**
 * What sounds from one onset to the next, from the score's first note to its last release. One sonority begins at every
 * onset, and one where everything falls silent; with `atBarlines` also one at every barline within (then a sonority
 * lies in one bar, and one that merely goes on has nothing attacked).
 */
export function sliceSonorities(score: Score, options: { readonly atBarlines?: boolean } = {}): Sonority[] {
  const starts = sliceStarts(score, options.atBarlines ?? false);
  const end = lastRelease(score.notes);
  const sounding = new SoundingNotes(score.notes);
  let bar = 0;
  return starts.map((start, i) => {
    while ((score.bars[bar + 1]?.start ?? Infinity) <= start) bar += 1;
    const here = score.bars[bar] as Bar;
    const notes = sounding.at(start);
    return {
      start: ticks(start),
      end: ticks(starts[i + 1] ?? end),
      bar,
      level: metricalLevel(score, here, start - here.start),
      sounding: notes,
      attacked: notes.filter((note) => note.start === start),
    };
  });
}

function lastRelease(notes: readonly Note[]): number {
  return notes.reduce((last, { start, duration }) => Math.max(last, start + duration), 0);
}

/** Sorted, without repetition. */
function sliceStarts(score: Score, atBarlines: boolean): number[] {
  const starts = new Set<number>();
  let released = -1;
  for (const { start, duration } of score.notes) {
    if (released >= 0 && released < start) starts.add(released);
    starts.add(start);
    released = Math.max(released, start + duration);
  }
  const first = score.notes[0]?.start ?? 0;
  if (atBarlines) for (const bar of score.bars) if (bar.start > first && bar.start < released) starts.add(bar.start);
  return [...starts].sort((a, b) => a - b);
}

/** Walks the notes once, in time. */
class SoundingNotes {
  private next = 0;
  private notes: Note[] = [];

  constructor(private readonly all: readonly Note[]) {}

  /** What sounds at `time`, from the bass up; times must not go back. */
  at(time: number): Note[] {
    this.notes = this.notes.filter(({ start, duration }) => start + duration > time);
    for (let note = this.all[this.next]; note && note.start <= time; note = this.all[this.next]) {
      this.notes.push(note);
      this.next += 1;
    }
    this.notes.sort((a, b) => midiOf(a.pitch) - midiOf(b.pitch) || a.id - b.id);
    return [...this.notes];
  }
}
