/**
 * Route handlers. A `route.ts` declares each method in a few lines:
 *
 *   export const PATCH = route(
 *     { name: 'readings.edit', can: canBeHere, body: 'json', input: editReadingInput },
 *     editReading,                              // (deps, actor, input) => Promise<Result<T, AppError>>
 *   );
 *   export const PUT = route({ name: 'scores.upload', can: canUploadScore, body: 'bytes', maxBytes: 10 * MB, input }, uploadScore);
 *   export const GET = route({ name: 'scores.file', can: canUseLibrary, input: z.object({ scoreId: z.uuid() }) }, async (deps, actor, input) => …);
 *
 * The schema gets one object: query parameters, then the body's fields, then the path's parameters (which win). A value
 * is sent as JSON (`{ "value": … }` is not wrapped: the value itself); a `Response` in the Result is sent as it is. An error is
 * `{ "error": { "code", "message", "fields"? } }` with the status of lib/errors. See action.ts for what happens around
 * the handler: everything but GET and HEAD must come from our own origin, bodies are bounded (`maxBytes`, 512 kB unless
 * said), nothing is cached. `publicRoute` is for people who are signed out.
 */
import { unstable_rethrow } from 'next/navigation';
import type { z } from 'zod';
import type { Visitor } from '@/lib/auth/actor';
import { type AppError, ERRORS, appError } from '@/lib/errors';
import { type Result, err } from '@/lib/result';
import { type Deps, createDeps } from '@/lib/workflows/deps';
import { type BodyKind, DEFAULT_MAX_BYTES, readBody } from './body';
import { type Endpoint, type Permission, registerEndpoint } from './endpoint';
import { isOwnOrigin } from './origin';
import { type Handler, type PublicHandler, errorOfThrown, guardedEndpoint, publicEndpoint, showError } from './run';
import { getVisitor } from './visitor';

interface PublicRouteDefinition<I> {
  readonly name: string;
  readonly input: z.ZodType<I>;
  /** `none` unless said. */
  readonly body?: BodyKind;
  readonly maxBytes?: number;
}

interface RouteDefinition<I> extends PublicRouteDefinition<I> {
  readonly can: Permission;
}

export interface RouteContext {
  readonly params: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}

export type RouteHandler = (request: Request, context: RouteContext) => Promise<Response>;

const READS = new Set(['GET', 'HEAD']);

export function errorResponse(error: AppError): Response {
  return Response.json({ error: showError(error) }, { status: ERRORS[error.code].status, headers: NOT_CACHED });
}

const NOT_CACHED = { 'cache-control': 'private, no-store' };

function responseOf(value: unknown): Response {
  if (value instanceof Response) return value;
  return Response.json(value ?? null, { headers: NOT_CACHED });
}

async function inputOf(
  request: Request,
  context: RouteContext,
  definition: PublicRouteDefinition<unknown>,
): Promise<Result<Record<string, unknown>, AppError>> {
  const body = await readBody(request, definition.body ?? 'none', definition.maxBytes ?? DEFAULT_MAX_BYTES);
  if (!body.ok) return body;
  const query = Object.fromEntries(new URL(request.url).searchParams);
  return { ok: true, value: { ...query, ...body.value, ...(await context.params) } };
}

async function answer(
  deps: Deps,
  visitor: Visitor,
  endpoint: Endpoint,
  request: Request,
  context: RouteContext,
  definition: PublicRouteDefinition<unknown>,
): Promise<Result<unknown, AppError>> {
  // A signed-out stranger's megabytes are not read.
  if (!visitor.actor && endpoint.permission !== 'signed out') return err(appError('signed_out'));
  const input = await inputOf(request, context, definition);
  return input.ok ? endpoint.run(deps, visitor, input.value) : input;
}

function handlerOf(endpoint: Endpoint, definition: PublicRouteDefinition<unknown>): RouteHandler {
  return async (request, context) => {
    const deps = createDeps();
    let visitor: Visitor | null = null;
    try {
      if (!READS.has(request.method) && !isOwnOrigin(request.headers, deps.appUrl)) return errorResponse(appError('bad_origin'));
      visitor = await getVisitor();
      const result = await answer(deps, visitor, endpoint, request, context, definition);
      return result.ok ? responseOf(result.value) : errorResponse(result.error);
    } catch (thrown) {
      unstable_rethrow(thrown);
      return errorResponse(errorOfThrown(deps, endpoint.name, visitor?.actor ?? null, thrown));
    }
  };
}

export function route<I, T>(definition: RouteDefinition<I>, handler: Handler<I, T>): RouteHandler {
  const endpoint = guardedEndpoint({ name: definition.name, kind: 'route' }, definition.can, definition.input, handler);
  return registerEndpoint(handlerOf(endpoint, definition), endpoint);
}

export function publicRoute<I, T>(definition: PublicRouteDefinition<I>, handler: PublicHandler<I, T>): RouteHandler {
  const endpoint = publicEndpoint({ name: definition.name, kind: 'route' }, definition.input, handler);
  return registerEndpoint(handlerOf(endpoint, definition), endpoint);
}
