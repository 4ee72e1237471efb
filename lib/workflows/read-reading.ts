import { z } from 'zod';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { type ReadingHead, findReading } from '@/db/queries/readings';
import { type StoredRevision, unsafeListRevisions } from '@/db/queries/revisions';
import type { Actor } from '@/lib/auth/actor';
import { isStaff } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { asAnswers, asPrinted } from '@/lib/harmony/answers';
import type { Change } from '@/lib/harmony/edit';
import type { Reading } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import type { ReadingState } from '@/lib/vocabularies';
import type { Deps } from './deps';
import { readingOf } from './stored-reading';

export const readingInput = z.object({ readingId: z.uuid() });

export interface ReadReading {
  readonly version: number;
  readonly state: ReadingState;
  readonly reading: Reading;
}

/** A reading's content. Of a submission, and for a student of any, nothing that the engine proposed is in it. */
export async function readReading(deps: Deps, actor: Actor, { readingId }: z.infer<typeof readingInput>): Promise<Result<ReadReading, AppError>> {
  const head = await findReading(deps.db, actor, readingId, deps.now());
  if (!head) return err(appError('not_found'));
  return ok({ version: head.version, state: head.state, reading: await loadReading(deps, actor, head) });
}

/** The content of a reading that the actor may see. */
export async function loadReading(deps: Deps, actor: Actor, head: ReadingHead): Promise<Reading> {
  const reading = readingOf(await unsafeLoadReadingContent(deps.db, head));
  if (head.kind === 'submission') return asAnswers(reading);
  return isStaff(actor) ? reading : asPrinted(reading);
}

/** An edit that was saved, as desks are told of it. */
export interface RevisionNews {
  readonly version: number;
  readonly editId: string;
  readonly change: Change;
  readonly by: string | null;
  readonly words: string;
  readonly at: string;
}

export interface ReadingNews {
  readonly version: number;
  readonly revisions: readonly RevisionNews[];
}

export const newsInput = readingInput.extend({ since: z.coerce.number().int().min(0) });

/** What was saved after a version: an open desk asks this every few seconds. */
export async function readNews(deps: Deps, actor: Actor, { readingId, since }: z.infer<typeof newsInput>): Promise<Result<ReadingNews, AppError>> {
  const head = await findReading(deps.db, actor, readingId, deps.now());
  return head ? ok(await listNews(deps, head, since)) : err(appError('not_found'));
}

export async function listNews(deps: Deps, head: ReadingHead, since: number): Promise<ReadingNews> {
  const rows = since < head.version ? await unsafeListRevisions(deps.db, head.id, since) : [];
  return { version: head.version, revisions: rows.map(newsOf) };
}

/** Revisions hold plain numbers for ticks, which `readingOf` gives their unit. */
function newsOf({ version, editId, before, after, by, createdAt }: StoredRevision): RevisionNews {
  const [from, to] = [before, after].map((side) => readingOf({ start: 0, end: 0, labels: side.labels, regions: side.regions })) as [Reading, Reading];
  const change: Change = { labels: { before: from.labels, after: to.labels }, regions: { before: from.regions, after: to.regions } };
  return { version, editId, change, by, words: after.words ?? '', at: createdAt.toISOString() };
}
