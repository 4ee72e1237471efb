import { z } from 'zod';
import { listMembers } from '@/db/queries/members';
import type { Actor } from '@/lib/auth/actor';
import { emailInput } from '@/lib/auth/email';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { ROLES } from '@/lib/vocabularies';
import type { Deps } from './deps';
import { writeInvitation } from './invite';

export const inviteMemberInput = z.object({ email: emailInput, role: z.enum(ROLES) });

/** The owner invites someone into the department. */
export async function inviteMember(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof inviteMemberInput>,
): Promise<Result<{ readonly invitationId: string }, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  const members = await listMembers(deps.db, actor);
  if (members.some((member) => member.email === input.email)) {
    return err(appError('already_there', 'This person is a member already.', { email: 'A member already.' }));
  }
  return ok(await writeInvitation(deps, actor, { ...input, course: null }));
}
