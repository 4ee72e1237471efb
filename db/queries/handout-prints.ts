import { and, eq, isNull } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { courses, excerpts, handoutPrints, readings, scores } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { ConventionSheet } from '@/lib/theory/conventions';

export interface PrintRow {
  readonly id: string;
  readonly readingId: string;
  readonly state: (typeof handoutPrints.$inferSelect)['state'];
  readonly failure: string | null;
  readonly pageCount: number | null;
  readonly pagesSha256: string | null;
  readonly pdfSha256: string | null;
  readonly options: (typeof handoutPrints.$inferSelect)['options'];
}

const COLUMNS = {
  id: handoutPrints.id,
  readingId: handoutPrints.readingId,
  state: handoutPrints.state,
  failure: handoutPrints.failure,
  pageCount: handoutPrints.pageCount,
  pagesSha256: handoutPrints.pagesSha256,
  pdfSha256: handoutPrints.pdfSha256,
  options: handoutPrints.options,
};

/** A print that the actor ordered; null otherwise. */
export async function findPrint(db: Db, actor: Actor, printId: string): Promise<PrintRow | null> {
  const [row] = await db
    .select(COLUMNS)
    .from(handoutPrints)
    .where(
      and(
        eq(handoutPrints.id, printId),
        eq(handoutPrints.departmentId, actor.departmentId),
        eq(handoutPrints.requestedBy, actor.userId),
      ),
    );
  return row ?? null;
}

export type NewPrint = Pick<
  typeof handoutPrints.$inferInsert,
  'id' | 'readingId' | 'readingVersion' | 'courseId' | 'options' | 'orderSha256'
>;

/** Keeps the order, or finds the one that was made before; its id, and whether it still has to be engraved. */
export async function placePrint(db: Db, actor: Actor, print: NewPrint): Promise<{ id: string; isNew: boolean }> {
  const placed = { ...print, departmentId: actor.departmentId, requestedBy: actor.userId };
  await db.insert(handoutPrints).ignore().values(placed);
  const [row] = await db
    .select({ id: handoutPrints.id, state: handoutPrints.state })
    .from(handoutPrints)
    .where(
      and(
        eq(handoutPrints.readingId, print.readingId),
        eq(handoutPrints.readingVersion, print.readingVersion),
        eq(handoutPrints.orderSha256, print.orderSha256),
      ),
    );
  if (!row) throw new Error('the print was neither kept nor found');
  if (row.state === 'failed') await db.update(handoutPrints).set({ state: 'queued', failure: null }).where(eq(handoutPrints.id, row.id));
  return { id: row.id, isNew: row.state !== 'ready' };
}

/** What the engraving job needs; null when the print does not wait any more or its reading is gone. No actor: for jobs. */
export async function unsafeFindQueuedPrint(db: Db, printId: string) {
  const [row] = await db
    .select({
      id: handoutPrints.id,
      options: handoutPrints.options,
      createdAt: handoutPrints.createdAt,
      readingId: readings.id,
      startTick: readings.startTick,
      endTick: readings.endTick,
      firstBar: excerpts.firstBar,
      lastBar: excerpts.lastBar,
      scoreSha256: scores.sha256,
      conventions: courses.conventions,
    })
    .from(handoutPrints)
    .innerJoin(readings, eq(readings.id, handoutPrints.readingId))
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .leftJoin(courses, eq(courses.id, handoutPrints.courseId))
    .where(and(eq(handoutPrints.id, printId), eq(handoutPrints.state, 'queued'), isNull(readings.deletedAt)));
  return row ? { ...row, conventions: row.conventions as ConventionSheet | null } : null;
}

export async function unsafeSavePrint(
  db: Db,
  printId: string,
  files: { readonly pageCount: number; readonly pagesSha256: string; readonly pdfSha256: string },
): Promise<void> {
  await db.update(handoutPrints).set({ ...files, state: 'ready', failure: null }).where(eq(handoutPrints.id, printId));
}

export async function unsafeFailPrint(db: Db, printId: string, failure: string): Promise<void> {
  await db.update(handoutPrints).set({ state: 'failed', failure }).where(eq(handoutPrints.id, printId));
}
