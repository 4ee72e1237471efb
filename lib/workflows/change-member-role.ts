import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findMember, hasOtherOwner } from '@/db/queries/members';
import { courseMembers, courses, departmentMembers } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { ROLES, type Role } from '@/lib/vocabularies';
import { type Deps, inTransaction } from './deps';

export const changeMemberRoleInput = z.object({ userId: z.uuid(), role: z.enum(ROLES) });

export const LAST_OWNER = 'The department needs an owner. Make someone else one first.';

/** The owner changes what a member is. */
export async function changeMemberRole(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof changeMemberRoleInput>,
): Promise<Result<null, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  return inTransaction(deps, async (deps) => {
    const member = await findMember(deps.db, actor, input.userId);
    if (!member) return err(appError('not_found'));
    if (member.role === input.role) return ok(null);
    const leavesNoOwner = member.role === 'owner' && !(await hasOtherOwner(deps.db, actor.departmentId, member.userId));
    if (leavesNoOwner) return err(appError('in_use', LAST_OWNER));
    await setRole(deps, actor, input.userId, input.role);
    await lowerCourseRoles(deps, actor, input.userId, input.role);
    const details = { from: member.role, to: input.role };
    await noteAudit(deps, actor, { verb: 'members.change_role', subjectKind: 'user', subjectId: member.userId, details });
    return ok(null);
  });
}

async function setRole(deps: Deps, actor: Actor, userId: string, role: Role): Promise<void> {
  await deps.db
    .update(departmentMembers)
    .set({ role })
    .where(and(eq(departmentMembers.departmentId, actor.departmentId), eq(departmentMembers.userId, userId)));
}

/** Nobody is more in a course than the department lets them be: an assistant teaches none, a student leaves the staff's. */
async function lowerCourseRoles(deps: Deps, actor: Actor, userId: string, role: Role): Promise<void> {
  if (role === 'owner' || role === 'instructor') return;
  const inDepartment = deps.db.select({ id: courses.id }).from(courses).where(eq(courses.departmentId, actor.departmentId));
  const own = and(eq(courseMembers.userId, userId), inArray(courseMembers.courseId, inDepartment));
  if (role === 'assistant') {
    await deps.db.update(courseMembers).set({ role: 'assistant' }).where(and(own, eq(courseMembers.role, 'instructor')));
  } else {
    await deps.db.delete(courseMembers).where(and(own, inArray(courseMembers.role, ['instructor', 'assistant'])));
  }
}
