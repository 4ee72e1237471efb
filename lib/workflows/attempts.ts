import { eq } from 'drizzle-orm';
import { countFailedAttempts, deleteAttemptsBefore } from '@/db/queries/sign-in';
import { signInAttempts } from '@/db/schema';
import { normalEmail } from '@/lib/auth/email';
import { LIMITS, LONGEST_WINDOW, isOverLimit } from '@/lib/auth/rate-limit';
import { keyedHash } from '@/lib/auth/token';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { SignInAttemptKind } from '@/lib/vocabularies';
import type { Deps } from './deps';

const MINUTE = 60_000;

export interface Attempt {
  readonly id: string;
}

/**
 * Counts a try before it is made, so that a hundred at once are not a hundred free ones, and refuses it over the limit.
 * The try counts as failed until `noteSuccess`.
 */
export async function beginAttempt(
  deps: Deps,
  kind: SignInAttemptKind,
  who: { readonly email: string; readonly address: string },
): Promise<Result<Attempt, AppError>> {
  const id = deps.newId();
  const keys = {
    emailHash: keyedHash(deps.secret, normalEmail(who.email)),
    addressHash: keyedHash(deps.secret, who.address),
  };
  const now = deps.now();
  await deps.db.insert(signInAttempts).values({ id, kind, ...keys, succeeded: false, createdAt: now });
  const limit = LIMITS[kind];
  const counts = await countFailedAttempts(deps.db, kind, keys, new Date(now.getTime() - limit.minutes * MINUTE));
  if (!isOverLimit(limit, counts)) return ok({ id });
  return err(appError('rate_limited', `Too many tries. Please wait ${limit.minutes} minutes.`));
}

export async function noteSuccess(deps: Deps, attempt: Attempt): Promise<void> {
  await deps.db.update(signInAttempts).set({ succeeded: true }).where(eq(signInAttempts.id, attempt.id));
  await deleteAttemptsBefore(deps.db, new Date(deps.now().getTime() - LONGEST_WINDOW * MINUTE));
}
