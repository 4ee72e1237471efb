import { eq } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { scores } from '@/db/schema';

/** Where a score's file lies, deleted scores included: readings of them can still be read. The caller has checked the reading. */
export async function unsafeFindScoreFile(db: Db, scoreId: string): Promise<{ readonly sha256: string } | null> {
  const [row] = await db.select({ sha256: scores.sha256 }).from(scores).where(eq(scores.id, scoreId));
  return row ?? null;
}
