import { createHash, createHmac, randomBytes } from 'node:crypto';

/** 256 random bits, as a link carries them. */
export function newToken(): string {
  return randomBytes(32).toString('base64url');
}

/** What is stored of a token: someone who reads the table cannot use its links. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** A keyed hash, for values with too little entropy for a plain one (e-mails, network addresses). */
export function keyedHash(secret: string, value: string): string {
  return createHmac('sha256', secret).update(value).digest('hex');
}
