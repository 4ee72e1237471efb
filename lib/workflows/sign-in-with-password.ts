import { unsafeFindUserForSignIn } from '@/db/queries/users';
import { verifyPassword } from '@/lib/auth/password';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { beginAttempt, noteSuccess } from './attempts';
import type { Deps } from './deps';

export interface SignedIn {
  readonly userId: string;
  /** The epoch the session begins in; see users.session_epoch. */
  readonly epoch: number;
}

/** Same answer, and about the same time, for an unknown e-mail, an account without a password and a wrong password. */
export async function signInWithPassword(
  deps: Deps,
  input: { readonly email: string; readonly password: string; readonly address: string },
): Promise<Result<SignedIn, AppError>> {
  const attempt = await beginAttempt(deps, 'password', input);
  if (!attempt.ok) return attempt;
  const user = await unsafeFindUserForSignIn(deps.db, input.email);
  const matches = await verifyPassword(user?.passwordHash ?? null, input.password);
  if (!user || !matches) return err(appError('bad_credentials'));
  await noteSuccess(deps, attempt.value);
  return ok({ userId: user.id, epoch: user.sessionEpoch });
}
