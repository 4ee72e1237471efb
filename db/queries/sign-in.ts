import { and, eq, gt, isNull, lt, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { signInAttempts, signInLinks } from '@/db/schema';
import type { SignInAttemptKind } from '@/lib/vocabularies';

export interface AttemptCounts {
  readonly byEmail: number;
  readonly byAddress: number;
}

/** How many tries that did not succeed were made since then for the account, and from the address. */
export async function countFailedAttempts(
  db: Db,
  kind: SignInAttemptKind,
  keys: { readonly emailHash: string; readonly addressHash: string },
  since: Date,
): Promise<AttemptCounts> {
  const [row] = await db
    .select({
      byEmail: sql<string>`coalesce(sum(${signInAttempts.emailHash} = ${keys.emailHash}), 0)`,
      byAddress: sql<string>`coalesce(sum(${signInAttempts.addressHash} = ${keys.addressHash}), 0)`,
    })
    .from(signInAttempts)
    .where(
      and(
        eq(signInAttempts.kind, kind),
        eq(signInAttempts.succeeded, false),
        gt(signInAttempts.createdAt, since),
        or(eq(signInAttempts.emailHash, keys.emailHash), eq(signInAttempts.addressHash, keys.addressHash)),
      ),
    );
  return { byEmail: Number(row?.byEmail ?? 0), byAddress: Number(row?.byAddress ?? 0) };
}

/** Tries older than any limit looks back are no one's business. */
export async function deleteAttemptsBefore(db: Db, before: Date): Promise<void> {
  await db.delete(signInAttempts).where(lt(signInAttempts.createdAt, before));
}

/** Uses a link up: of two requests with the same one, one gets the person. */
export async function claimSignInLink(db: Db, tokenHash: string, now: Date): Promise<string | null> {
  const usable = and(eq(signInLinks.tokenHash, tokenHash), isNull(signInLinks.usedAt), gt(signInLinks.expiresAt, now));
  const [link] = await db.select({ userId: signInLinks.userId }).from(signInLinks).where(usable).for('update');
  if (!link) return null;
  await db.update(signInLinks).set({ usedAt: now }).where(usable);
  return link.userId;
}
