import { z } from 'zod';
import { findInvitation } from '@/db/queries/members';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import { writeInvitation } from './invite';

export const invitationInput = z.object({ invitationId: z.uuid() });

/** Sends it again with a new link; the old one stops working. */
export async function resendInvitation(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof invitationInput>,
): Promise<Result<{ readonly invitationId: string }, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  const invitation = await findInvitation(deps.db, actor, input.invitationId);
  if (!invitation) return err(appError('not_found'));
  const { email, role, courseId, courseTitle } = invitation;
  const course = courseId === null ? null : { id: courseId, title: courseTitle ?? '' };
  return ok(await writeInvitation(deps, actor, { email, role, course }));
}
