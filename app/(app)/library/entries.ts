import { type Progress, formatBars, progressOfExcerpt } from '@/components/library/excerpt-progress';
import { type ExcerptListRow, listExcerptsOfScores, listOpeningKeys, listReadingsOfExcerpts } from '@/db/queries/excerpts';
import type { Actor } from '@/lib/auth/actor';
import type { Key } from '@/lib/theory/key';
import { fifths } from '@/lib/theory/pitch';
import type { Deps } from '@/lib/workflows/deps';

/** An excerpt as a row of the library. */
export interface ExcerptEntry {
  readonly id: string;
  readonly scoreId: string;
  readonly title: string;
  readonly purpose: string;
  /** As printed: `5–12`. */
  readonly bars: string;
  readonly barCount: number;
  readonly key: Key | null;
  readonly hasSecondaryDiminished: boolean;
  readonly progress: Progress;
  readonly creatorName: string;
  readonly createdAt: Date;
}

/** The excerpts of some scores by score, each with its key and how far its readings are. */
export async function listExcerptEntries(db: Deps['db'], actor: Actor, scoreIds: readonly string[]): Promise<ReadonlyMap<string, readonly ExcerptEntry[]>> {
  const excerpts = await listExcerptsOfScores(db, actor, scoreIds);
  const ids = excerpts.map(({ id }) => id);
  const [readings, keys] = await Promise.all([listReadingsOfExcerpts(db, actor, ids), listOpeningKeys(db, actor, ids)]);
  const entries = excerpts.map((excerpt) => entryOf(excerpt, readings.filter(({ excerptId }) => excerptId === excerpt.id), keys.find(({ excerptId }) => excerptId === excerpt.id)));
  return new Map(scoreIds.map((scoreId) => [scoreId, entries.filter((entry) => entry.scoreId === scoreId)]));
}

type Readings = Awaited<ReturnType<typeof listReadingsOfExcerpts>>;
type OpeningKey = Awaited<ReturnType<typeof listOpeningKeys>>[number];

function entryOf(excerpt: ExcerptListRow, readings: Readings, key: OpeningKey | undefined): ExcerptEntry {
  const { id, scoreId, title, purpose, firstBar, lastBar, firstNumber, lastNumber, creatorName, createdAt } = excerpt;
  return {
    id,
    scoreId,
    title,
    purpose,
    bars: formatBars({ index: firstBar, number: firstNumber }, { index: lastBar, number: lastNumber }),
    barCount: lastBar - firstBar + 1,
    key: key ? { tonic: fifths(key.tonicFifths), mode: key.mode } : null,
    hasSecondaryDiminished: readings.some(({ diminishedCount }) => diminishedCount > 0),
    progress: progressOfExcerpt(readings),
    creatorName,
    createdAt,
  };
}
