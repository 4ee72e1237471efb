import { z } from 'zod';
import { listAudience } from '@/db/queries/reading-audience';
import { findReading } from '@/db/queries/readings';
import {
  type RemarkRow,
  deleteRemark,
  insertRemark,
  setRemarkResolved,
  unsafeFindRemark,
  unsafeListRemarks,
  updateRemarkBody,
} from '@/db/queries/remarks';
import type { Actor } from '@/lib/auth/actor';
import { canRemarkOnReading } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';
import { readingInput } from './read-reading';
import { mailAboutRemark } from './remark-mail';

/** A remark as it is shown; times as ISO text. */
export interface Remark {
  readonly id: string;
  /** The remark it answers; null when it begins a thread. */
  readonly threadId: string | null;
  readonly labelId: string | null;
  readonly barIndex: number | null;
  readonly body: string;
  readonly by: string;
  /** The reader's own: may be changed and taken back. */
  readonly own: boolean;
  readonly resolved: boolean;
  readonly at: string;
  readonly edited: boolean;
}

export interface Remarks {
  readonly remarks: readonly Remark[];
  readonly canRemark: boolean;
}

function shown(actor: Actor, row: RemarkRow): Remark {
  const { id, threadId, labelId, barIndex, body } = row;
  const edited = row.updatedAt.getTime() - row.createdAt.getTime() > 2_000 && row.resolvedAt === null;
  return { id, threadId, labelId, barIndex, body, by: row.authorName, own: row.authorId === actor.userId, resolved: row.resolvedAt !== null, at: row.createdAt.toISOString(), edited };
}

export async function listRemarks(deps: Deps, actor: Actor, { readingId }: z.infer<typeof readingInput>): Promise<Result<Remarks, AppError>> {
  const reading = await findReading(deps.db, actor, readingId, deps.now());
  if (!reading) return err(appError('not_found'));
  return ok(await allRemarks(deps, actor, readingId, canRemarkOnReading(actor, reading.access)));
}

async function allRemarks(deps: Deps, actor: Actor, readingId: string, canRemark: boolean): Promise<Remarks> {
  const rows = await unsafeListRemarks(deps.db, readingId);
  return { remarks: rows.map((row) => shown(actor, row)), canRemark };
}

const body = z.string().trim().min(1, 'Write something first.').max(4_000, 'A remark has at most 4,000 characters.');

export const addRemarkInput = readingInput.extend({
  body,
  labelId: z.uuid().nullable().default(null),
  barIndex: z.int().min(0).nullable().default(null),
  threadId: z.uuid().nullable().default(null),
});

/** Adds a remark on a label, on a bar or on the whole; an answer takes its thread's place. Answers with all remarks; whom it concerns gets a mail. */
export async function addRemark(deps: Deps, actor: Actor, input: z.infer<typeof addRemarkInput>): Promise<Result<Remarks, AppError>> {
  const head = await findReading(deps.db, actor, input.readingId, deps.now());
  if (!head || !canRemarkOnReading(actor, head.access)) return err(appError('not_found'));
  const thread = input.threadId ? await unsafeFindRemark(deps.db, input.readingId, input.threadId) : null;
  if (input.threadId && !thread) return err(appError('not_found', 'The remark you answer was taken back.'));
  const { readingId, body: text } = input;
  const place = thread ? { labelId: thread.labelId, barIndex: thread.barIndex } : { labelId: input.labelId, barIndex: input.barIndex };
  const threadId = thread ? (thread.threadId ?? thread.id) : null;
  await inTransaction(deps, async (inside) => {
    await insertRemark(inside.db, { id: inside.newId(), readingId, threadId, ...place, authorId: actor.userId, body: text, createdAt: inside.now() });
    await mailAboutRemark(inside, actor, head, { body: text, threadId, labelId: place.labelId });
  });
  return ok(await allRemarks(deps, actor, readingId, true));
}

async function canRemarkHere(deps: Deps, actor: Actor, readingId: string): Promise<boolean> {
  const reading = await findReading(deps.db, actor, readingId, deps.now());
  return reading !== null && canRemarkOnReading(actor, reading.access);
}

export const changeRemarkInput = readingInput.extend({ remarkId: z.uuid(), body: body.optional(), resolved: z.boolean().optional() });

/** Rewords one's own remark, or settles or reopens a thread (whoever may remark). */
export async function changeRemark(deps: Deps, actor: Actor, input: z.infer<typeof changeRemarkInput>): Promise<Result<Remarks, AppError>> {
  if (!(await canRemarkHere(deps, actor, input.readingId))) return err(appError('not_found'));
  const remark = await unsafeFindRemark(deps.db, input.readingId, input.remarkId);
  if (!remark) return err(appError('not_found'));
  if (input.body !== undefined && !(await updateRemarkBody(deps.db, remark.id, actor.userId, input.body))) return err(appError('not_found'));
  if (input.resolved !== undefined) await setRemarkResolved(deps.db, remark.id, input.resolved ? deps.now() : null, input.resolved ? actor.userId : null);
  return ok(await allRemarks(deps, actor, input.readingId, true));
}

export const deleteRemarkInput = readingInput.extend({ remarkId: z.uuid() });

/** Takes back one's own remark. */
export async function takeBackRemark(deps: Deps, actor: Actor, input: z.infer<typeof deleteRemarkInput>): Promise<Result<Remarks, AppError>> {
  if (!(await canRemarkHere(deps, actor, input.readingId))) return err(appError('not_found'));
  const remark = await unsafeFindRemark(deps.db, input.readingId, input.remarkId);
  if (!remark || !(await deleteRemark(deps.db, remark.id, actor.userId, deps.now()))) return err(appError('not_found'));
  return ok(await allRemarks(deps, actor, input.readingId, true));
}

export interface RemarkPeople {
  /** Names that can be written as `@Name`, in order; not one's own. */
  readonly people: readonly string[];
}

/** Who can be named in a remark on a reading: whoever else may write one. */
export async function listRemarkPeople(deps: Deps, actor: Actor, { readingId }: z.infer<typeof readingInput>): Promise<Result<RemarkPeople, AppError>> {
  const head = await findReading(deps.db, actor, readingId, deps.now());
  if (!head || !canRemarkOnReading(actor, head.access)) return err(appError('not_found'));
  const audience = await listAudience(deps.db, actor, head);
  return ok({ people: [...new Set(audience.filter((p) => p.userId !== actor.userId).map((p) => p.name))] });
}
