import type { SignInAttemptKind } from '@/lib/vocabularies';

/** Failed tries allowed within a window. An address may be a whole classroom behind one router. */
export interface Limit {
  readonly minutes: number;
  readonly perEmail: number;
  readonly perAddress: number;
}

/**
 * A password guessed wrongly locks only the password for a while: the link by mail has its own count, so that nobody can
 * lock another person out.
 */
export const LIMITS: Readonly<Record<SignInAttemptKind, Limit>> = {
  password: { minutes: 15, perEmail: 8, perAddress: 60 },
  link: { minutes: 15, perEmail: 20, perAddress: 20 },
  link_request: { minutes: 60, perEmail: 5, perAddress: 60 },
  enrolment: { minutes: 15, perEmail: 10, perAddress: 120 },
};

/** The longest time any limit looks back, in minutes. */
export const LONGEST_WINDOW = Math.max(...Object.values(LIMITS).map((limit) => limit.minutes));

/** Counts include the try being made. */
export function isOverLimit(limit: Limit, counts: { readonly byEmail: number; readonly byAddress: number }): boolean {
  return counts.byEmail > limit.perEmail || counts.byAddress > limit.perAddress;
}
