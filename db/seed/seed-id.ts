import { createHash } from 'node:crypto';

/** The same id for the same name on every run (RFC 9562 version 8): a second run finds what the first one made. */
export function seedId(name: string): string {
  const hex = createHash('sha256').update(`understave demo: ${name}`).digest('hex');
  const variant = ((parseInt(hex.slice(16, 17), 16) & 3) | 8).toString(16);
  return [hex.slice(0, 8), hex.slice(8, 12), `8${hex.slice(13, 16)}`, `${variant}${hex.slice(17, 20)}`, hex.slice(20, 32)].join('-');
}
