import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { excerpts, readings, scores } from '@/db/schema';
import { type StoredReading, deleteReadingContent, insertReadingContent } from './reading-rows';

/** Readings of the score's excerpts that wait for the engine. For jobs: there is no actor. */
export async function unsafeListProposing(db: Db, scoreId: string): Promise<string[]> {
  const rows = await db
    .select({ id: readings.id })
    .from(readings)
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .where(and(eq(excerpts.scoreId, scoreId), eq(readings.state, 'proposing'), isNull(readings.deletedAt)));
  return rows.map(({ id }) => id);
}

/** What the engine needs for a reading that waits for it; null when it does not wait any more. */
export async function unsafeFindProposing(db: Db, readingId: string) {
  const [row] = await db
    .select({
      id: readings.id,
      departmentId: readings.departmentId,
      startTick: readings.startTick,
      endTick: readings.endTick,
      sha256: scores.sha256,
      scoreId: scores.id,
      scoreState: scores.state,
    })
    .from(readings)
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .where(and(eq(readings.id, readingId), eq(readings.state, 'proposing'), isNull(readings.deletedAt)));
  return row ?? null;
}

/** Puts the engine's content into a reading that waits for it; false when somebody else was there first. */
export async function unsafeSaveProposal(db: Db, readingId: string, reading: StoredReading): Promise<boolean> {
  return db.transaction(async (tx) => {
    const [waiting] = await tx
      .select({ id: readings.id })
      .from(readings)
      .where(and(eq(readings.id, readingId), eq(readings.state, 'proposing')))
      .for('update');
    if (!waiting) return false;
    await deleteReadingContent(tx, readingId);
    await insertReadingContent(tx, readingId, reading);
    await tx.update(readings).set({ state: 'open' }).where(eq(readings.id, readingId));
    return true;
  });
}

/** The engine cannot fill these: the page says so and offers to try again. */
export async function unsafeFailProposals(db: Db, readingIds: readonly string[]): Promise<void> {
  if (readingIds.length === 0) return;
  await db
    .update(readings)
    .set({ state: 'failed' })
    .where(and(inArray(readings.id, [...readingIds]), eq(readings.state, 'proposing')));
}
