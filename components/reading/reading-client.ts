import type { Reading } from '@/lib/harmony/reading';
import type { PendingEdit, Revision } from './desk-state';

/** The desk's talk with the server about one reading. `base` is the reading's address: `/api/readings/…`. */

export interface Received {
  readonly version: number;
  readonly revisions: readonly Revision[];
}

export interface FetchedReading {
  readonly version: number;
  readonly reading: Reading;
}

export type SaveAnswer =
  | ({ readonly kind: 'saved' } & Received)
  | { readonly kind: 'overtaken' }
  | { readonly kind: 'refused'; readonly message: string }
  | { readonly kind: 'signed-out' }
  | { readonly kind: 'unreachable' };

export async function postEdit(base: string, baseVersion: number, edit: PendingEdit): Promise<SaveAnswer> {
  const { editId, change, words } = edit;
  const response = await send(`${base}/edits`, { editId, baseVersion, change, words });
  if (!response || response.status >= 500 || response.status === 429) return { kind: 'unreachable' };
  if (response.status === 401) return { kind: 'signed-out' };
  if (response.ok) return { kind: 'saved', ...((await response.json()) as Received) };
  const { code, message } = await readError(response);
  return code === 'version_conflict' ? { kind: 'overtaken' } : { kind: 'refused', message };
}

export async function fetchReading(base: string): Promise<FetchedReading | null> {
  const response = await fetch(base, { cache: 'no-store' }).catch(() => null);
  return response?.ok ? ((await response.json()) as FetchedReading) : null;
}

export async function fetchRevisions(base: string, since: number): Promise<Received | null> {
  const response = await fetch(`${base}/edits?since=${since}`, { cache: 'no-store' }).catch(() => null);
  return response?.ok ? ((await response.json()) as Received) : null;
}

async function send(url: string, body: unknown): Promise<Response | null> {
  const headers = { 'content-type': 'application/json' };
  return fetch(url, { method: 'POST', headers, body: JSON.stringify(body) }).catch(() => null);
}

async function readError(response: Response): Promise<{ code: string; message: string }> {
  const body = (await response.json().catch(() => null)) as { error?: { code?: string; message?: string } } | null;
  return { code: body?.error?.code ?? '', message: body?.error?.message ?? 'This edit was not taken.' };
}
