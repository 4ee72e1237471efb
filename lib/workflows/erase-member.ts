import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { countOtherDepartments, findMember } from '@/db/queries/members';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';
import { erasePerson } from './erase-person';
import type { memberInput } from './remove-member';

const ELSEWHERE = 'This person also belongs to another department. Remove them here; they can delete their account themselves.';
const NOT_YOURSELF = 'Your own account is deleted on your account page.';

/** The owner deletes a member's data when the person asks for it, or has left. */
export async function eraseMember(deps: Deps, actor: Actor, input: z.output<typeof memberInput>): Promise<Result<null, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  return inTransaction(deps, async (deps) => {
    const member = await findMember(deps.db, actor, input.userId);
    if (!member) return err(appError('not_found'));
    if (member.userId === actor.userId) return err(appError('in_use', NOT_YOURSELF));
    if ((await countOtherDepartments(deps.db, actor, member.userId)) > 0) return err(appError('in_use', ELSEWHERE));
    await erasePerson(deps, member);
    const details = { role: member.role };
    await noteAudit(deps, actor, { verb: 'members.erase', subjectKind: 'user', subjectId: member.userId, details });
    return ok(null);
  });
}
