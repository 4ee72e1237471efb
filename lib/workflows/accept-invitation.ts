import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { type OpenInvitation, unsafeFindInvitationByToken } from '@/db/queries/members';
import { courseMembers, departmentMembers, invitations, users } from '@/db/schema';
import type { Visitor } from '@/lib/auth/actor';
import { nameInput } from '@/lib/auth/email';
import { checkNewPassword, hashPassword } from '@/lib/auth/password';
import { hashToken } from '@/lib/auth/token';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';

/** Name and password are for someone new; a person who has an account keeps theirs. */
export const acceptInvitationInput = z.object({
  token: z.string().min(1).max(200),
  name: nameInput.optional(),
  password: z.string().max(1000).optional(),
});

type AcceptInput = z.output<typeof acceptInvitationInput>;

export interface AcceptedInvitation {
  readonly email: string;
  /** They had an account before, and sign in as they always do. */
  readonly known: boolean;
}

/** Whoever holds the link of a mail reads that mailbox: no more proof is asked. */
export async function acceptInvitation(
  deps: Deps,
  _visitor: Visitor,
  input: AcceptInput,
): Promise<Result<AcceptedInvitation, AppError>> {
  return inTransaction(deps, async (deps) => {
    const invitation = await unsafeFindInvitationByToken(deps.db, hashToken(input.token), deps.now());
    if (!invitation) return err(appError('link_expired'));
    const person = invitation.userId === null ? await makeUser(deps, invitation, input) : ok(invitation.userId);
    if (!person.ok) return person;
    await join(deps, invitation, person.value);
    await deps.db.update(invitations).set({ acceptedAt: deps.now() }).where(eq(invitations.id, invitation.id));
    await noteAudit(
      deps,
      { departmentId: invitation.departmentId, userId: person.value },
      { verb: 'members.join', subjectKind: 'user', subjectId: person.value, details: { role: invitation.role } },
    );
    return ok({ email: invitation.email, known: invitation.userId !== null });
  });
}

async function makeUser(deps: Deps, invitation: OpenInvitation, input: AcceptInput): Promise<Result<string, AppError>> {
  const { name, password = '' } = input;
  const wrongPassword = checkNewPassword(password, invitation.email);
  if (!name || wrongPassword) {
    const fields = { ...(name ? {} : { name: 'Please write your name.' }), ...(wrongPassword ? { password: wrongPassword } : {}) };
    return err(appError('bad_input', undefined, fields));
  }
  const id = deps.newId();
  await deps.db.insert(users).values({
    id,
    email: invitation.email,
    name,
    passwordHash: await hashPassword(password),
    emailVerifiedAt: deps.now(),
  });
  return ok(id);
}

/** A membership that is there already stays as it is: an invitation never changes a role. */
async function join(deps: Deps, invitation: OpenInvitation, userId: string): Promise<void> {
  const { departmentId, courseId, role } = invitation;
  const keep = { set: { userId } };
  await deps.db.insert(departmentMembers).values({ departmentId, userId, role }).onDuplicateKeyUpdate(keep);
  if (courseId === null || role === 'owner') return;
  await deps.db.insert(courseMembers).values({ courseId, userId, role }).onDuplicateKeyUpdate(keep);
}
