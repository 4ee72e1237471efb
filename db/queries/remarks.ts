import { and, asc, eq, isNull, or } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { labels, remarks, users } from '@/db/schema';

export interface RemarkRow {
  readonly id: string;
  readonly threadId: string | null;
  readonly labelId: string | null;
  readonly barIndex: number | null;
  readonly body: string;
  readonly authorId: string;
  readonly authorName: string;
  readonly resolvedAt: Date | null;
  readonly createdAt: Date;
  readonly updatedAt: Date;
}

const REMARK_COLUMNS = {
  id: remarks.id,
  threadId: remarks.threadId,
  labelId: remarks.labelId,
  barIndex: remarks.barIndex,
  body: remarks.body,
  authorId: remarks.authorId,
  authorName: users.name,
  resolvedAt: remarks.resolvedAt,
  createdAt: remarks.createdAt,
  updatedAt: remarks.updatedAt,
};

/** All remarks of a reading, in the order they were written. Whoever calls it has checked who may see the reading. */
export async function unsafeListRemarks(db: Db, readingId: string): Promise<RemarkRow[]> {
  return db
    .select(REMARK_COLUMNS)
    .from(remarks)
    .innerJoin(users, eq(users.id, remarks.authorId))
    .where(and(eq(remarks.readingId, readingId), isNull(remarks.deletedAt)))
    .orderBy(asc(remarks.createdAt), asc(remarks.written));
}

export async function unsafeFindRemark(db: Db, readingId: string, remarkId: string): Promise<RemarkRow | null> {
  const [row] = await db
    .select(REMARK_COLUMNS)
    .from(remarks)
    .innerJoin(users, eq(users.id, remarks.authorId))
    .where(and(eq(remarks.id, remarkId), eq(remarks.readingId, readingId), isNull(remarks.deletedAt)));
  return row ?? null;
}

export interface NewRemark {
  readonly id: string;
  readonly readingId: string;
  readonly threadId: string | null;
  readonly labelId: string | null;
  readonly barIndex: number | null;
  readonly authorId: string;
  readonly body: string;
  readonly createdAt: Date;
}

export async function insertRemark(db: Db, remark: NewRemark): Promise<void> {
  await db.insert(remarks).values(remark);
}

/** Changes what a person wrote; only their own. False when it is not theirs. */
export async function updateRemarkBody(db: Db, remarkId: string, authorId: string, body: string): Promise<boolean> {
  const [result] = await db
    .update(remarks)
    .set({ body })
    .where(and(eq(remarks.id, remarkId), eq(remarks.authorId, authorId)));
  return result.affectedRows === 1;
}

export async function setRemarkResolved(db: Db, remarkId: string, resolvedAt: Date | null, resolvedBy: string | null): Promise<void> {
  await db.update(remarks).set({ resolvedAt, resolvedBy }).where(eq(remarks.id, remarkId));
}

/** Takes back a remark, with the answers to it when it began a thread. Only the author's own. */
export async function deleteRemark(db: Db, remarkId: string, authorId: string, deletedAt: Date): Promise<boolean> {
  const [result] = await db
    .update(remarks)
    .set({ deletedAt })
    .where(and(eq(remarks.id, remarkId), eq(remarks.authorId, authorId)));
  return result.affectedRows === 1;
}

/** Who wrote in a thread, by user id, each once. `threadId` is the remark it began with. */
export async function listThreadWriters(db: Db, threadId: string): Promise<string[]> {
  const rows = await db
    .selectDistinct({ authorId: remarks.authorId })
    .from(remarks)
    .where(and(or(eq(remarks.id, threadId), eq(remarks.threadId, threadId)), isNull(remarks.deletedAt)));
  return rows.map((row) => row.authorId);
}

/** The tick a label of a reading begins at; null when it is gone. */
export async function findLabelStart(db: Db, readingId: string, labelId: string): Promise<number | null> {
  const [row] = await db.select({ start: labels.startTick }).from(labels).where(and(eq(labels.id, labelId), eq(labels.readingId, readingId)));
  return row?.start ?? null;
}
