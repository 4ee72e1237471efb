import { createHash } from 'node:crypto';

/**
 * Files under the SHA-256 of their bytes (64 lower-case hexadecimal digits): the same file is kept once, and what comes
 * out is what went in. Everything rejects with a StoreError when the store does not answer.
 */
export interface ObjectStore {
  /** Keeps the bytes; again is no harm. `type` is a media type. */
  put(sha256: string, bytes: Uint8Array, type: string): Promise<void>;
  /** Null when there is no such object. */
  get(sha256: string): Promise<Uint8Array<ArrayBuffer> | null>;
  exists(sha256: string): Promise<boolean>;
  /** Removes it; a missing one is no harm. */
  remove(sha256: string): Promise<void>;
  /** Rejects when the store or its bucket does not answer within ten seconds. */
  check(): Promise<void>;
}

/** The store did not do what it was asked; the cause says why. */
export class StoreError extends Error {
  override readonly name = 'StoreError';
}

export function sha256Of(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}
