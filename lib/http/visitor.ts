import { headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { getServerSession } from 'next-auth';
import { cache } from 'react';
import { findActor } from '@/db/queries/users';
import type { Actor, Visitor } from '@/lib/auth/actor';
import { addressOf } from './address';
import { getAuthOptions } from './auth-options';
import { createDeps } from '@/lib/workflows/deps';
import type { Permission } from './endpoint';

/**
 * Whoever sent this request. The session's cookie only names a person and the epoch it began in; who they are and what
 * they may do is read from the database, once per request.
 */
export const getVisitor = cache(async (): Promise<Visitor> => {
  const session = await getServerSession(getAuthOptions());
  const address = addressOf(await headers());
  if (!session?.began) return { actor: null, address, session: null };
  const { userId, epoch, method, signedInAt } = session.began;
  const actor = await findActor(createDeps().db, userId, epoch);
  return { actor, address, session: actor && { method, signedInAt: new Date(signedInAt) } };
});

export async function getActor(): Promise<Actor | null> {
  return (await getVisitor()).actor;
}

/**
 * For pages: the actor, or the sign-in page. With a permission, a page that is not for the actor does not exist:
 * `const actor = await requireActor(canUseLibrary)`.
 */
export async function requireActor(can?: Permission): Promise<Actor> {
  const actor = await getActor();
  if (!actor) redirect(await signInPath());
  if (can && !can(actor)) notFound();
  return actor;
}

/** The sign-in page, which comes back to the page that was asked for (proxy.ts says which that is). */
async function signInPath(): Promise<string> {
  const from = (await headers()).get('x-understave-path');
  return from && from !== '/' ? `/sign-in?from=${encodeURIComponent(from)}` : '/sign-in';
}

/** For pages: what a scoped query found, or the not-found page. */
export function orNotFound<T>(found: T | null | undefined): T {
  if (found === null || found === undefined) notFound();
  return found;
}
