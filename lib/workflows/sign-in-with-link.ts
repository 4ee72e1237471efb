import { eq } from 'drizzle-orm';
import { claimSignInLink } from '@/db/queries/sign-in';
import { unsafeFindUserById } from '@/db/queries/users';
import { users } from '@/db/schema';
import { hashToken } from '@/lib/auth/token';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { beginAttempt, noteSuccess } from './attempts';
import type { Deps } from './deps';
import type { SignedIn } from './sign-in-with-password';

/** Uses a one-time link. It came by mail, so the e-mail is verified by it. */
export async function signInWithLink(
  deps: Deps,
  input: { readonly token: string; readonly address: string },
): Promise<Result<SignedIn, AppError>> {
  const attempt = await beginAttempt(deps, 'link', { email: input.address, address: input.address });
  if (!attempt.ok) return attempt;
  const user = await deps.db.transaction(async (db) => {
    const userId = await claimSignInLink(db, hashToken(input.token), deps.now());
    if (userId === null) return null;
    await db.update(users).set({ emailVerifiedAt: deps.now() }).where(eq(users.id, userId));
    return unsafeFindUserById(db, userId);
  });
  if (!user) return err(appError('link_expired'));
  await noteSuccess(deps, attempt.value);
  return ok({ userId: user.id, epoch: user.sessionEpoch });
}
