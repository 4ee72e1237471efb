import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { courseMembers, courses } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canCreateCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { courseWords } from './course-input';
import { type Deps, inTransaction } from './deps';

/** Opens a course; whoever opens it teaches it. */
export async function createCourse(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof courseWords>,
): Promise<Result<{ readonly courseId: string }, AppError>> {
  if (!canCreateCourse(actor)) return err(appError('not_found'));
  const courseId = deps.newId();
  await inTransaction(deps, async (inside) => {
    await inside.db.insert(courses).values({ id: courseId, departmentId: actor.departmentId, ...input, createdAt: inside.now() });
    await inside.db.insert(courseMembers).values({ courseId, userId: actor.userId, role: 'instructor', createdAt: inside.now() });
    await noteAudit(inside, actor, { verb: 'courses.create', subjectKind: 'course', subjectId: courseId });
  });
  return ok({ courseId });
}
