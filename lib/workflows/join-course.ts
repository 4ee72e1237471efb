import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findCourseByCode } from '@/db/queries/courses';
import { courseMembers } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canJoinCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { beginAttempt, noteSuccess } from './attempts';
import type { joinCourseInput } from './course-input';
import type { Deps } from './deps';

/** A student joins by the code their instructor gave out. Guessing is limited as sign-in is. */
export async function joinCourse(
  deps: Deps,
  actor: Actor,
  { code }: z.output<typeof joinCourseInput>,
): Promise<Result<{ readonly courseId: string; readonly title: string }, AppError>> {
  if (!canJoinCourse(actor)) return err(appError('not_found'));
  const attempt = await beginAttempt(deps, 'enrolment', { email: actor.email, address: actor.userId });
  if (!attempt.ok) return attempt;
  const course = await findCourseByCode(deps.db, actor, code);
  if (!course) return err(appError('not_found', 'No course takes this code. Look at it again, or ask your instructor.', { code: 'No course takes this code.' }));
  await noteSuccess(deps, attempt.value);
  const member = { courseId: course.id, userId: actor.userId, role: 'student' as const, createdAt: deps.now() };
  const [made] = await deps.db.insert(courseMembers).ignore().values(member);
  if (made.affectedRows > 0) await noteAudit(deps, actor, { verb: 'courses.join', subjectKind: 'course', subjectId: course.id });
  return ok({ courseId: course.id, title: course.title });
}
