import { eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { unsafeFindUserById } from '@/db/queries/users';
import { queueMail } from '@/db/queries/outbox';
import { noteAudit } from '@/db/queries/audit';
import { signInLinks, users } from '@/db/schema';
import type { Actor, Visitor } from '@/lib/auth/actor';
import { checkNewPassword, hashPassword, verifyPassword } from '@/lib/auth/password';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { beginAttempt, noteSuccess } from './attempts';
import { type Deps, inTransaction } from './deps';

export const changePasswordInput = z.object({
  current: z.string().max(1000).default(''),
  password: z.string().max(1000),
});

/** After a sign-in by link the old password is not asked for: this is how a forgotten one is replaced. */
const FRESH_MINUTES = 30;

/** Ends every session of the person, this one too: the page signs in again with the new password. */
export async function changePassword(
  deps: Deps,
  visitor: Visitor,
  input: z.output<typeof changePasswordInput>,
): Promise<Result<{ readonly email: string }, AppError>> {
  const { actor } = visitor;
  if (!actor) return err(appError('signed_out'));
  const wrong = checkNewPassword(input.password, actor.email);
  if (wrong) return err(appError('bad_input', undefined, { password: wrong }));
  const proof = await checkPerson(deps, visitor, actor, input.current);
  if (!proof.ok) return proof;
  await setPassword(deps, actor, await hashPassword(input.password));
  return ok({ email: actor.email });
}

/** Whether a person who is signed in has just shown who they are, by the link in their mail. */
export function hasFreshLink(visitor: Visitor, now: Date): boolean {
  const { session } = visitor;
  return session?.method === 'link' && now.getTime() - session.signedInAt.getTime() < FRESH_MINUTES * 60_000;
}

/** Someone at an unlocked computer is not enough: the password, or a fresh sign-in by link. */
export async function checkPerson(deps: Deps, visitor: Visitor, actor: Actor, password: string): Promise<Result<null, AppError>> {
  if (hasFreshLink(visitor, deps.now())) return ok(null);
  const user = await unsafeFindUserById(deps.db, actor.userId);
  if (!user?.passwordHash) {
    return err(appError('bad_credentials', 'Sign in by a link to your mailbox first; then come back here.'));
  }
  const attempt = await beginAttempt(deps, 'password', { email: actor.email, address: visitor.address });
  if (!attempt.ok) return attempt;
  if (!(await verifyPassword(user.passwordHash, password))) {
    return err(appError('bad_credentials', undefined, { current: 'This is not your password.' }));
  }
  await noteSuccess(deps, attempt.value);
  return ok(null);
}

async function setPassword(deps: Deps, actor: Actor, passwordHash: string): Promise<void> {
  await inTransaction(deps, async (deps) => {
    await deps.db
      .update(users)
      .set({ passwordHash, sessionEpoch: sql`${users.sessionEpoch} + 1` })
      .where(eq(users.id, actor.userId));
    await deps.db.delete(signInLinks).where(eq(signInLinks.userId, actor.userId));
    await noteAudit(deps, actor, { verb: 'account.change_password', subjectKind: 'user', subjectId: actor.userId });
    const text =
      'The password of your Understave account was changed just now, and every device was signed out.\n\n' +
      `If that was not you, ask for a link to sign in and choose a new one: ${deps.appUrl}/sign-in/link`;
    await queueMail(deps.db, deps.newId(), { to: actor.email, subject: 'Your password was changed', text }, deps.now());
  });
}
