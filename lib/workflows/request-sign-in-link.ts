import { z } from 'zod';
import { queueMail } from '@/db/queries/outbox';
import { unsafeFindUserForSignIn } from '@/db/queries/users';
import { signInLinks } from '@/db/schema';
import type { Visitor } from '@/lib/auth/actor';
import { emailInput } from '@/lib/auth/email';
import { hashToken, newToken } from '@/lib/auth/token';
import type { AppError } from '@/lib/errors';
import { type Result, ok } from '@/lib/result';
import { beginAttempt } from './attempts';
import { type Deps, inTransaction } from './deps';

export const requestSignInLinkInput = z.object({ email: emailInput });

/** How long a link works, in minutes. */
export const LINK_MINUTES = 20;

/** The answer is the same whether anyone has this e-mail or not. */
export async function requestSignInLink(
  deps: Deps,
  visitor: Visitor,
  input: z.output<typeof requestSignInLinkInput>,
): Promise<Result<{ readonly email: string }, AppError>> {
  const attempt = await beginAttempt(deps, 'link_request', { email: input.email, address: visitor.address });
  if (!attempt.ok) return attempt;
  const user = await unsafeFindUserForSignIn(deps.db, input.email);
  if (user) await sendLink(deps, user.id, input.email);
  return ok({ email: input.email });
}

async function sendLink(deps: Deps, userId: string, email: string): Promise<void> {
  const token = newToken();
  const expiresAt = new Date(deps.now().getTime() + LINK_MINUTES * 60_000);
  const text = [
    'Open this link to sign in to Understave:',
    `${deps.appUrl}/sign-in/link?token=${token}`,
    `It works once, within ${LINK_MINUTES} minutes. Once signed in you can choose a new password on your account page.`,
    'If you did not ask for this, do nothing: nobody gets in without the link.',
  ].join('\n\n');
  await inTransaction(deps, async (deps) => {
    await deps.db.insert(signInLinks).values({ tokenHash: hashToken(token), userId, expiresAt, createdAt: deps.now() });
    await queueMail(deps.db, deps.newId(), { to: email, subject: 'Your link to sign in', text }, deps.now());
  });
}
