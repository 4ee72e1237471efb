import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { listRoster } from '@/db/queries/courses';
import { courseMembers } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { findCourseFor } from './course-access';
import type { removePersonInput } from './course-input';
import type { Deps } from './deps';

/** Takes someone off the roster. Their work stays, and is there again when they come back. */
export async function removePerson(
  deps: Deps,
  actor: Actor,
  { courseId, userId }: z.output<typeof removePersonInput>,
): Promise<Result<{ readonly courseId: string }, AppError>> {
  const course = await findCourseFor(deps, actor, courseId, canRunCourse);
  if (!course.ok) return course;
  const roster = await listRoster(deps.db, actor, courseId);
  const person = roster.find((row) => row.userId === userId);
  if (!person) return err(appError('not_found'));
  const others = roster.some((row) => row.courseRole === 'instructor' && row.userId !== userId);
  if (person.courseRole === 'instructor' && !others) return err(appError('in_use', 'A course keeps at least one instructor.'));
  await deps.db.delete(courseMembers).where(and(eq(courseMembers.courseId, courseId), eq(courseMembers.userId, userId)));
  await noteAudit(deps, actor, { verb: 'courses.remove', subjectKind: 'user', subjectId: userId, details: { courseId } });
  return ok({ courseId });
}
