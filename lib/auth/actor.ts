import type { Role } from '@/lib/vocabularies';

/** The signed-in person, in the department they are working in. Made from the session on every request, never stored. */
export interface Actor {
  readonly userId: string;
  readonly departmentId: string;
  readonly role: Role;
  readonly name: string;
  readonly email: string;
}

export const SIGN_IN_METHODS = ['password', 'link', 'provider'] as const;
export type SignInMethod = (typeof SIGN_IN_METHODS)[number];

/** Whoever sends a request, signed in or not. */
export interface Visitor {
  readonly actor: Actor | null;
  /** The network address as the proxy nearest to us saw it; for rate limits, never logged. */
  readonly address: string;
  /** How and when the session began; null when signed out. */
  readonly session: { readonly method: SignInMethod; readonly signedInAt: Date } | null;
}
