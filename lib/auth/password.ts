import { hash, verify } from '@node-rs/argon2';

/**
 * argon2id, 19 MiB, two passes, one lane: the OWASP password storage cheat sheet's recommendation.
 * Algorithm.Argon2id is 2; the package's enum is ambient, which isolated modules cannot read.
 */
const ARGON2ID = { algorithm: 2, memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 } as const;

export const PASSWORD_MIN = 10;
export const PASSWORD_MAX = 200;

export async function hashPassword(password: string): Promise<string> {
  return hash(password.normalize('NFKC'), ARGON2ID);
}

/** Hash of a password that nobody has: checked where there is none, so that an unknown e-mail takes as long as a known one. */
let nobody: Promise<string> | undefined;

export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  if (passwordHash !== null) return verify(passwordHash, password.normalize('NFKC'));
  nobody ??= hashPassword('no password is this one');
  await verify(await nobody, password.normalize('NFKC'));
  return false;
}

/** What is wrong with a new password, as a sentence; null when it will do. */
export function checkNewPassword(password: string, email: string): string | null {
  if (password.length < PASSWORD_MIN) return `Use at least ${PASSWORD_MIN} characters.`;
  if (password.length > PASSWORD_MAX) return `Use at most ${PASSWORD_MAX} characters.`;
  if (new Set(password).size < 5) return 'Use more different characters.';
  const mailbox = email.split('@')[0] ?? '';
  if (mailbox.length >= 4 && password.toLowerCase().includes(mailbox.toLowerCase())) return 'Leave your e-mail out of it.';
  return null;
}
