import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { hasOtherOwner } from '@/db/queries/members';
import { getMemberships } from '@/db/queries/users';
import type { Visitor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { LAST_OWNER } from './change-member-role';
import { checkPerson } from './change-password';
import { type Deps, inTransaction } from './deps';
import { erasePerson } from './erase-person';

export const eraseOwnAccountInput = z.object({ current: z.string().max(1000).default('') });

/** A person deletes their own account and data, in every department (see erasePerson for what that means). */
export async function eraseOwnAccount(
  deps: Deps,
  visitor: Visitor,
  input: z.output<typeof eraseOwnAccountInput>,
): Promise<Result<null, AppError>> {
  const { actor } = visitor;
  if (!actor) return err(appError('signed_out'));
  const proof = await checkPerson(deps, visitor, actor, input.current);
  if (!proof.ok) return proof;
  return inTransaction(deps, async (deps) => {
    const memberships = await getMemberships(deps.db, actor.userId);
    for (const { departmentId, role } of memberships) {
      const last = role === 'owner' && !(await hasOtherOwner(deps.db, departmentId, actor.userId));
      if (last) return err(appError('in_use', LAST_OWNER));
    }
    await erasePerson(deps, actor);
    for (const { departmentId } of memberships) {
      await noteAudit(deps, { departmentId, userId: null }, { verb: 'account.erase', subjectKind: 'user', subjectId: actor.userId });
    }
    return ok(null);
  });
}
