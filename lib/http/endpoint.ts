import type { Actor, Visitor } from '@/lib/auth/actor';
import type { AppError } from '@/lib/errors';
import type { Result } from '@/lib/result';
import type { Deps } from '@/lib/workflows/deps';

/**
 * What an action or a route does once the web is taken off it: the permission matrix (tests/integration) runs every one
 * of these as every role against the real database.
 */
export interface Endpoint {
  /** `aggregate.verb`, unique: `scores.upload`. */
  readonly name: string;
  readonly kind: 'action' | 'route';
  /** Name of the predicate that guards it, or `signed out` when anyone may call it. */
  readonly permission: string;
  /** Parses the input, asks the predicate, runs the workflow. Throws only on bugs. */
  run(deps: Deps, visitor: Visitor, rawInput: unknown): Promise<Result<unknown, AppError>>;
}

export type Permission = (actor: Actor) => boolean;

const ENDPOINTS = new WeakMap<object, Endpoint>();

export function registerEndpoint<F extends object>(exported: F, endpoint: Endpoint): F {
  ENDPOINTS.set(exported, endpoint);
  return exported;
}

/** The endpoint behind an export of an actions.ts or a route.ts; null for an export that did not come from lib/http. */
export function findEndpoint(exported: unknown): Endpoint | null {
  return typeof exported === 'function' ? (ENDPOINTS.get(exported) ?? null) : null;
}
