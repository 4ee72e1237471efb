import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findInvitation } from '@/db/queries/members';
import { invitations } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';
import type { invitationInput } from './resend-invitation';

export async function revokeInvitation(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof invitationInput>,
): Promise<Result<null, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  return inTransaction(deps, async (deps) => {
    const invitation = await findInvitation(deps.db, actor, input.invitationId);
    if (!invitation) return err(appError('not_found'));
    const itself = and(eq(invitations.id, invitation.id), eq(invitations.departmentId, actor.departmentId));
    await deps.db.update(invitations).set({ revokedAt: deps.now() }).where(itself);
    await noteAudit(deps, actor, { verb: 'members.revoke_invitation', subjectKind: 'invitation', subjectId: invitation.id });
    return ok(null);
  });
}
