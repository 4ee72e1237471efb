import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findMember, hasOtherOwner } from '@/db/queries/members';
import { courseMembers, courses, departmentMembers } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { LAST_OWNER } from './change-member-role';
import { type Deps, inTransaction } from './deps';

export const memberInput = z.object({ userId: z.uuid() });

/** The owner takes someone out of the department and its courses. What they made stays, under their name. */
export async function removeMember(deps: Deps, actor: Actor, input: z.output<typeof memberInput>): Promise<Result<null, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  return inTransaction(deps, async (deps) => {
    const member = await findMember(deps.db, actor, input.userId);
    if (!member) return err(appError('not_found'));
    const leavesNoOwner = member.role === 'owner' && !(await hasOtherOwner(deps.db, actor.departmentId, member.userId));
    if (leavesNoOwner) return err(appError('in_use', LAST_OWNER));
    await leaveDepartment(deps, actor.departmentId, member.userId);
    const details = { role: member.role };
    await noteAudit(deps, actor, { verb: 'members.remove', subjectKind: 'user', subjectId: member.userId, details });
    return ok(null);
  });
}

/** Takes a person out of a department and of every course in it. */
export async function leaveDepartment(deps: Deps, departmentId: string, userId: string): Promise<void> {
  const inDepartment = deps.db.select({ id: courses.id }).from(courses).where(eq(courses.departmentId, departmentId));
  await deps.db.delete(courseMembers).where(and(eq(courseMembers.userId, userId), inArray(courseMembers.courseId, inDepartment)));
  await deps.db
    .delete(departmentMembers)
    .where(and(eq(departmentMembers.departmentId, departmentId), eq(departmentMembers.userId, userId)));
}
