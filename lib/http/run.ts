import type { z } from 'zod';
import { databaseErrorCode } from '@/db/client';
import type { Actor, Visitor } from '@/lib/auth/actor';
import { type AppError, appError, messageOf } from '@/lib/errors';
import { describeError } from '@/lib/log';
import { type Result, err, ok } from '@/lib/result';
import { StoreError } from '@/lib/storage/object-store';
import type { Deps } from '@/lib/workflows/deps';
import type { Endpoint, Permission } from './endpoint';

/** A use case for someone who is signed in: exactly the shape of a workflow, so that one can be passed as it is. */
export type Handler<I, T> = (deps: Deps, actor: Actor, input: I) => Promise<Result<T, AppError>>;

/** A use case that anyone may call; it looks at the visitor itself. */
export type PublicHandler<I, T> = (deps: Deps, visitor: Visitor, input: I) => Promise<Result<T, AppError>>;

/** An error as it leaves the server: always with a sentence for people. */
export interface ShownError extends AppError {
  readonly message: string;
}

export type Outcome<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: ShownError };

export function showError(error: AppError): ShownError {
  return { ...error, message: messageOf(error) };
}

/** Field path (`alternatives.0.credit`) → the first thing wrong with it. */
function fieldsOf(error: z.ZodError): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) fields[issue.path.join('.')] ??= issue.message;
  return fields;
}

function parseInput<I>(schema: z.ZodType<I>, rawInput: unknown): Result<I, AppError> {
  const parsed = schema.safeParse(rawInput);
  if (parsed.success) return ok(parsed.data);
  return err(appError('bad_input', undefined, fieldsOf(parsed.error)));
}

type EndpointHead = Pick<Endpoint, 'name' | 'kind'>;

/** Signed out comes before refused, and refused before what is wrong with the input: an outsider learns nothing of it. */
export function guardedEndpoint<I, T>(
  head: EndpointHead,
  can: Permission,
  schema: z.ZodType<I>,
  handler: Handler<I, T>,
): Endpoint & { run(deps: Deps, visitor: Visitor, rawInput: unknown): Promise<Result<T, AppError>> } {
  return {
    ...head,
    permission: can.name,
    async run(deps, visitor, rawInput) {
      if (!visitor.actor) return err(appError('signed_out'));
      if (!can(visitor.actor)) return err(appError('not_found'));
      const input = parseInput(schema, rawInput);
      return input.ok ? handler(deps, visitor.actor, input.value) : input;
    },
  };
}

export function publicEndpoint<I, T>(
  head: EndpointHead,
  schema: z.ZodType<I>,
  handler: PublicHandler<I, T>,
): Endpoint & { run(deps: Deps, visitor: Visitor, rawInput: unknown): Promise<Result<T, AppError>> } {
  return {
    ...head,
    permission: 'signed out',
    async run(deps, visitor, rawInput) {
      const input = parseInput(schema, rawInput);
      return input.ok ? handler(deps, visitor, input.value) : input;
    },
  };
}

const UNREACHABLE = new Set(['ECONNREFUSED', 'ECONNRESET', 'ETIMEDOUT', 'EPIPE', 'PROTOCOL_CONNECTION_LOST', 'ENOTFOUND']);

/** Turns a thrown bug into an answer; the log gets ids and the error's name, never the input. */
export function errorOfThrown(deps: Deps, name: string, actor: Actor | null, thrown: unknown): AppError {
  const code = databaseErrorCode(thrown);
  const unavailable = thrown instanceof StoreError || (code !== null && UNREACHABLE.has(code));
  const who = actor ? { userId: actor.userId, departmentId: actor.departmentId } : {};
  deps.log.error(
    { endpoint: name, ...who, ...describeError(thrown) },
    unavailable ? 'a part is not answering' : 'an endpoint threw',
  );
  return appError(unavailable ? 'unavailable' : 'internal');
}
