import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';

/** How a route's body is read. `bytes` gives the schema `{ bytes: Uint8Array, contentType: string }`. */
export type BodyKind = 'none' | 'json' | 'form' | 'bytes';

export const DEFAULT_MAX_BYTES = 512 * 1024;

/** Reads a body and stops at the bound, whatever its Content-Length claims. */
export async function readBounded(request: Request, maxBytes: number): Promise<Result<Uint8Array<ArrayBuffer>, AppError>> {
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) return err(tooLarge(maxBytes));
  if (!request.body) return ok(new Uint8Array());
  const chunks: Uint8Array[] = [];
  let length = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    length += chunk.byteLength;
    if (length > maxBytes) return err(tooLarge(maxBytes));
    chunks.push(chunk);
  }
  return ok(joined(chunks, length));
}

function joined(chunks: readonly Uint8Array[], length: number): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(length);
  let offset = 0;
  for (const chunk of chunks) {
    whole.set(chunk, offset);
    offset += chunk.byteLength;
  }
  return whole;
}

function tooLarge(maxBytes: number): AppError {
  return appError('too_large', `That is too large: at most ${Math.floor(maxBytes / 1024)} kB can be sent here.`);
}

/** A form's fields; a name that comes several times becomes a list. */
export function fieldsOfForm(form: FormData): Record<string, unknown> {
  const fields: Record<string, unknown> = {};
  for (const name of new Set(form.keys())) {
    if (name.startsWith('$ACTION')) continue;
    const values = form.getAll(name);
    fields[name] = values.length === 1 ? values[0] : values;
  }
  return fields;
}

/** The body as an object of fields for the schema. */
export async function readBody(
  request: Request,
  kind: BodyKind,
  maxBytes: number,
): Promise<Result<Record<string, unknown>, AppError>> {
  if (kind === 'none') return ok({});
  const bytes = await readBounded(request, maxBytes);
  if (!bytes.ok) return bytes;
  const contentType = request.headers.get('content-type') ?? '';
  if (kind === 'bytes') return ok({ bytes: bytes.value, contentType });
  return kind === 'json' ? parseJson(bytes.value, contentType) : parseForm(bytes.value, contentType);
}

function parseJson(bytes: Uint8Array, contentType: string): Result<Record<string, unknown>, AppError> {
  if (!/^application\/json(?:;|$)/i.test(contentType)) return err(appError('bad_input', 'This takes JSON.'));
  try {
    const value: unknown = JSON.parse(new TextDecoder().decode(bytes));
    if (typeof value === 'object' && value !== null && !Array.isArray(value)) return ok(value as Record<string, unknown>);
    return err(appError('bad_input', 'This takes a JSON object.'));
  } catch {
    return err(appError('bad_input', 'The JSON cannot be read.'));
  }
}

async function parseForm(bytes: Uint8Array<ArrayBuffer>, contentType: string): Promise<Result<Record<string, unknown>, AppError>> {
  try {
    return ok(fieldsOfForm(await new Response(bytes, { headers: { 'content-type': contentType } }).formData()));
  } catch {
    return err(appError('bad_input', 'The form cannot be read.'));
  }
}
