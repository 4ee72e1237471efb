import { and, eq } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { submissions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';

/** The actor's own submission that a reading belongs to. */
export async function findOwnSubmissionOfReading(db: Db, actor: Actor, readingId: string): Promise<string | null> {
  const [row] = await db
    .select({ id: submissions.id })
    .from(submissions)
    .where(and(eq(submissions.readingId, readingId), eq(submissions.studentId, actor.userId)));
  return row?.id ?? null;
}
