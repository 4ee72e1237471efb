import { eq } from 'drizzle-orm';
import { isDuplicate } from '@/db/client';
import { findUserOfIdentity, unsafeFindUserById, unsafeFindUserForSignIn } from '@/db/queries/users';
import { accounts, users } from '@/db/schema';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import type { SignedIn } from './sign-in-with-password';

export interface ProviderIdentity {
  readonly issuer: string;
  readonly subject: string;
  readonly email: string | null;
  readonly emailVerified: boolean;
}

const NO_ACCOUNT = 'Nobody here has this e-mail. Ask your department for an invitation.';

/**
 * Signs in whoever the OpenID provider vouches for: an identity known already, or else the person whose e-mail the
 * provider has verified, whose identity is then remembered. Nobody is made an account: people come by invitation.
 */
export async function signInWithProvider(deps: Deps, identity: ProviderIdentity): Promise<Result<SignedIn, AppError>> {
  const known = await findUserOfIdentity(deps.db, identity.issuer, identity.subject);
  const user = known ? await unsafeFindUserById(deps.db, known) : await adoptIdentity(deps, identity);
  return user ? ok({ userId: user.id, epoch: user.sessionEpoch }) : err(appError('bad_credentials', NO_ACCOUNT));
}

async function adoptIdentity(deps: Deps, identity: ProviderIdentity) {
  if (!identity.email || !identity.emailVerified) return null;
  const user = await unsafeFindUserForSignIn(deps.db, identity.email);
  if (!user) return null;
  await deps.db.transaction(async (db) => {
    await db.insert(accounts).values({
      id: deps.newId(),
      userId: user.id,
      provider: identity.issuer,
      providerAccountId: identity.subject,
    }).catch(ignoreDuplicate);
    await db.update(users).set({ emailVerifiedAt: deps.now() }).where(eq(users.id, user.id));
  });
  return user;
}

/** Two sign-ins at once remember the same identity. */
function ignoreDuplicate(error: unknown): void {
  if (!isDuplicate(error)) throw error;
}
