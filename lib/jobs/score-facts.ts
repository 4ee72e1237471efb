import { beatStarts } from '@/lib/score/metre';
import type { Score } from '@/lib/score/score';

/** What the library shows of a score, and what cutting excerpts needs; the notes stay in the file. */
export interface ScoreFacts {
  readonly title: string;
  readonly work: string;
  readonly composer: string;
  readonly ticksPerQuarter: number;
  readonly bars: readonly { readonly index: number; readonly number: string; readonly start: number; readonly length: number; readonly beats: readonly number[] }[];
  readonly noteCount: number;
  /** The first key signature; null when the file has none. */
  readonly keyFifths: number | null;
  readonly warnings: readonly { readonly code: string; readonly message: string; readonly line?: number; readonly bar?: number }[];
}

/** Past this many warnings a person learns nothing new from the next. */
const WARNINGS = 50;

export function factsOf(score: Score): ScoreFacts {
  return {
    title: score.title,
    work: score.work,
    composer: score.composer,
    ticksPerQuarter: score.ticksPerQuarter,
    bars: score.bars.map((bar) => ({ index: bar.index, number: bar.number, start: bar.start, length: bar.length, beats: beatStarts(score, bar) })),
    noteCount: score.notes.length,
    keyFifths: score.keySignatures[0]?.fifths ?? null,
    warnings: score.warnings.slice(0, WARNINGS),
  };
}
