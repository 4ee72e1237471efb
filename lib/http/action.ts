/**
 * Server actions. An `actions.ts` beside a page declares each in a few lines and holds no logic:
 *
 *   'use server';
 *   export const cutExcerpt = action(
 *     { name: 'excerpts.cut', can: canCutExcerpt, input: cutExcerptInput, revalidate: ({ scoreId }) => [`/scores/${scoreId}`] },
 *     cutExcerptWorkflow,                       // (deps, actor, input) => Promise<Result<T, AppError>>, from lib/workflows
 *   );
 *
 * The client calls `const outcome = await cutExcerpt(input)`: `{ ok: true, value }`, or `{ ok: false, error: { code,
 * message, fields? } }`, never a throw. `formAction` is the same for `useActionState(action, null)` and gets its input from
 * the form's fields (zod: `z.coerce`, checkboxes send 'on'). `publicAction`, `publicFormAction` are for people who are
 * signed out; their handler gets the visitor instead of the actor.
 *
 * What happens around the handler: the origin is checked, the session becomes the actor, `can(actor)` is asked (refused:
 * not_found), zod parses the input (wrong: bad_input with fields), the handler runs, a throw is logged with ids only.
 * Object permissions belong in the workflow and its queries: actor first, scope in the where clause, nothing found or
 * refused → err(appError('not_found')).
 *
 * Values must be serialisable. `revalidate` lists paths; `redirectTo` sends the browser on after success.
 * Every export needs a row in the table of tests/integration/permission-matrix.test.ts; the test names what is missing.
 */
import { revalidatePath } from 'next/cache';
import { headers } from 'next/headers';
import { redirect, unstable_rethrow } from 'next/navigation';
import type { z } from 'zod';
import type { Visitor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err } from '@/lib/result';
import { type Deps, createDeps } from '@/lib/workflows/deps';
import { fieldsOfForm } from './body';
import { type Endpoint, type Permission, registerEndpoint } from './endpoint';
import { isOwnOrigin } from './origin';
import { type Handler, type Outcome, type PublicHandler, errorOfThrown, guardedEndpoint, publicEndpoint, showError } from './run';
import { getVisitor } from './visitor';

/** What happens after success. */
interface After<T> {
  readonly revalidate?: (value: T) => readonly string[];
  readonly redirectTo?: (value: T) => string;
}

interface PublicActionDefinition<I, In, T> extends After<T> {
  readonly name: string;
  readonly input: z.ZodType<I, In>;
}

interface ActionDefinition<I, In, T> extends PublicActionDefinition<I, In, T> {
  readonly can: Permission;
}

type Runner<T> = Pick<Endpoint, 'name'> & {
  run(deps: Deps, visitor: Visitor, rawInput: unknown): Promise<Result<T, AppError>>;
};

export type Action<In, T> = (input: In) => Promise<Outcome<T>>;
export type FormAction<T> = (previous: Outcome<T> | null, form: FormData) => Promise<Outcome<T>>;

async function runCaught<T>(endpoint: Runner<T>, rawInput: unknown): Promise<Result<T, AppError>> {
  const deps = createDeps();
  let visitor: Visitor | null = null;
  try {
    if (!isOwnOrigin(await headers(), deps.appUrl)) return err(appError('bad_origin'));
    visitor = await getVisitor();
    return await endpoint.run(deps, visitor, rawInput);
  } catch (thrown) {
    unstable_rethrow(thrown);
    return err(errorOfThrown(deps, endpoint.name, visitor?.actor ?? null, thrown));
  }
}

async function perform<T>(
  endpoint: Runner<T>,
  after: After<T>,
  rawInput: unknown,
): Promise<Outcome<T>> {
  const result = await runCaught(endpoint, rawInput);
  if (!result.ok) return { ok: false, error: showError(result.error) };
  for (const path of after.revalidate?.(result.value) ?? []) revalidatePath(path);
  if (after.redirectTo) redirect(after.redirectTo(result.value));
  return result;
}

function actionOf<In, T>(endpoint: Endpoint & Runner<T>, after: After<T>): Action<In, T> {
  return registerEndpoint(async (input: In) => perform(endpoint, after, input), endpoint);
}

function formActionOf<T>(endpoint: Endpoint & Runner<T>, after: After<T>): FormAction<T> {
  return registerEndpoint(
    async (_previous: Outcome<T> | null, form: FormData) => perform(endpoint, after, fieldsOfForm(form)),
    endpoint,
  );
}

export function action<I, In, T>(definition: ActionDefinition<I, In, T>, handler: Handler<I, T>): Action<In, T> {
  const head = { name: definition.name, kind: 'action' } as const;
  return actionOf(guardedEndpoint(head, definition.can, definition.input, handler), definition);
}

export function formAction<I, In, T>(definition: ActionDefinition<I, In, T>, handler: Handler<I, T>): FormAction<T> {
  const head = { name: definition.name, kind: 'action' } as const;
  return formActionOf(guardedEndpoint(head, definition.can, definition.input, handler), definition);
}

export function publicAction<I, In, T>(
  definition: PublicActionDefinition<I, In, T>,
  handler: PublicHandler<I, T>,
): Action<In, T> {
  const head = { name: definition.name, kind: 'action' } as const;
  return actionOf(publicEndpoint(head, definition.input, handler), definition);
}

export function publicFormAction<I, In, T>(
  definition: PublicActionDefinition<I, In, T>,
  handler: PublicHandler<I, T>,
): FormAction<T> {
  const head = { name: definition.name, kind: 'action' } as const;
  return formActionOf(publicEndpoint(head, definition.input, handler), definition);
}
