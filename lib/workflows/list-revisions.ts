import { z } from 'zod';
import { findReading } from '@/db/queries/readings';
import { type StoredRevision, type StoredSide, unsafeListRevisionsBack } from '@/db/queries/revisions';
import type { Actor } from '@/lib/auth/actor';
import { canEditReading } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import type { Label } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import { readingInput } from './read-reading';
import { readingOf } from './stored-reading';

export const listRevisionsInput = readingInput.extend({
  /** Only those before this version: the next page. */
  before: z.coerce.number().int().min(1).max(2_000_000_000).default(2_000_000_000),
});

/** A saved edit in the list: who, when, what. */
export interface ListedRevision {
  readonly version: number;
  /** Null for the engine and for people who are gone. */
  readonly by: string | null;
  readonly at: string;
  readonly words: string;
  /** The first labels that it changed, before and after; null where there was none or is none now. */
  readonly changed: readonly { readonly before: Label | null; readonly after: Label | null }[];
  /** How many it changed in all. */
  readonly count: number;
}

export interface RevisionList {
  readonly revisions: readonly ListedRevision[];
  /** There are older ones. */
  readonly more: boolean;
}

const PAGE = 30;
const SHOWN = 3;

/** The history of a reading, newest first, a page at a time: for those who may edit it, and so may bring a state back. */
export async function listRevisions(deps: Deps, actor: Actor, { readingId, before }: z.output<typeof listRevisionsInput>): Promise<Result<RevisionList, AppError>> {
  const head = await findReading(deps.db, actor, readingId, deps.now());
  if (!head || !canEditReading(actor, head.access)) return err(appError('not_found'));
  const rows = await unsafeListRevisionsBack(deps.db, head.id, before, PAGE + 1);
  return ok({ revisions: rows.slice(0, PAGE).map(listed), more: rows.length > PAGE });
}

function listed({ version, by, createdAt, before, after }: StoredRevision): ListedRevision {
  const changed = pairs(labelsOf(before), labelsOf(after));
  return { version, by, at: createdAt.toISOString(), words: after.words ?? '', changed: changed.slice(0, SHOWN), count: changed.length };
}

function labelsOf({ labels, regions }: StoredSide): readonly Label[] {
  return readingOf({ start: 0, end: 0, labels: labels.map((label) => ({ ...label, others: [] })), regions }).labels;
}

function pairs(before: readonly Label[], after: readonly Label[]): ListedRevision['changed'] {
  const kept = after.map((label) => ({ before: before.find((b) => b.id === label.id) ?? null, after: label }));
  const gone = before.filter((b) => !after.some((a) => a.id === b.id)).map((label) => ({ before: label, after: null }));
  return [...kept, ...gone].sort((a, b) => startOf(a) - startOf(b));
}

function startOf({ before, after }: ListedRevision['changed'][number]): number {
  return (after ?? before)?.start ?? 0;
}
