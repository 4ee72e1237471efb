'use client';

import { signIn } from 'next-auth/react';
import { ERRORS, type ErrorCode } from '@/lib/errors';
import type { Outcome } from '@/lib/http/run';
import { signInErrorMessage } from '@/lib/http/sign-in-error';

/** Signs in through one of our next-auth providers; the outcome as any action's. */
export async function enter(provider: 'password' | 'link', credentials: Record<string, string>): Promise<Outcome<null>> {
  const answer = await signIn(provider, { ...credentials, redirect: false });
  if (answer?.ok) return { ok: true, value: null };
  const name = answer?.error ?? 'internal';
  const code: ErrorCode = Object.hasOwn(ERRORS, name) ? (name as ErrorCode) : 'internal';
  return { ok: false, error: { code, message: signInErrorMessage(name) } };
}
