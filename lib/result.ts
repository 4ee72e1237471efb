/** An expected outcome: a value, or an error that the caller must look at. Bugs throw; expected failures are Results. */
export type Result<T, E> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: E };

export function ok<T>(value: T): { readonly ok: true; readonly value: T } {
  return { ok: true, value };
}

export function err<E>(error: E): { readonly ok: false; readonly error: E } {
  return { ok: false, error };
}

/** Takes the value out of a Result that cannot fail here; throws (a bug) when it does. */
export function unwrap<T, E>(result: Result<T, E>): T {
  if (result.ok) return result.value;
  throw new Error('unwrap of a failed Result', { cause: result.error });
}
