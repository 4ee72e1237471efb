import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, submissions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';

/** The actor's own submission that a reading belongs to. */
export async function findOwnSubmissionOfReading(db: Db, actor: Actor, readingId: string): Promise<string | null> {
  const [row] = await db
    .select({ id: submissions.id })
    .from(submissions)
    .where(and(eq(submissions.readingId, readingId), eq(submissions.studentId, actor.userId)));
  return row?.id ?? null;
}

/** The actor's course whose assignment a reading is the key of; the first set of several, null for none. */
export async function findCourseOfKey(db: Db, actor: Actor, readingId: string): Promise<string | null> {
  const [row] = await db
    .select({ id: courses.id })
    .from(assignments)
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(courseMembers, and(eq(courseMembers.courseId, courses.id), eq(courseMembers.userId, actor.userId)))
    .where(and(eq(assignments.keyReadingId, readingId), eq(courses.departmentId, actor.departmentId), isNull(assignments.deletedAt)))
    .orderBy(asc(assignments.createdAt))
    .limit(1);
  return row?.id ?? null;
}
