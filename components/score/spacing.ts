import type { Score } from '@/lib/score/score';

/** How far the engraver sets notes apart: its own measure times `multiplier`, and `addend` more for each note. */
export interface Spacing {
  readonly multiplier: number;
  readonly addend: number;
}

/** Chords that change with nearly every note need the room of a label at each; running notes carry a label only now and then. */
const SPARSE = { onsets: 1.5, multiplier: 1.25, addend: 5 } as const;
const RUNNING = { onsets: 3, multiplier: 0.85, addend: 3 } as const;

/** The spacing at which labels seldom need a second row, for music of so many onsets to the quarter note. */
export function widenFor(onsets: number): Spacing {
  const share = Math.max(0, Math.min(1, (RUNNING.onsets - onsets) / (RUNNING.onsets - SPARSE.onsets)));
  const between = (running: number, sparse: number) => running + share * (sparse - running);
  return { multiplier: between(RUNNING.multiplier, SPARSE.multiplier), addend: between(RUNNING.addend, SPARSE.addend) };
}

/** Moments at which a note begins, per quarter note, in the bars from `first` to `last` (both included). */
export function onsetsPerQuarter(score: Score, first: number, last: number): number {
  const from = score.bars[first]?.start ?? 0;
  const end = score.bars[last];
  const to = end ? end.start + end.length : from;
  const starts = new Set(score.notes.filter((n) => n.start >= from && n.start < to).map((n) => n.start));
  return to > from ? (starts.size * score.ticksPerQuarter) / (to - from) : 0;
}
