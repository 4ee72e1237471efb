import { describe, expect, it } from 'vitest';
import { checkNewPassword, hashPassword, verifyPassword } from '@/lib/auth/password';

describe('hashPassword', () => {
  it('makes argon2id with the parameters of the OWASP password storage cheat sheet', async () => {
    // Source: OWASP Password Storage Cheat Sheet: argon2id, 19 MiB of memory, an iteration count of 2, parallelism 1.
    expect(await hashPassword('a password of mine')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  it('salts: the same password gives another hash', async () => {
    expect(await hashPassword('a password of mine')).not.toBe(await hashPassword('a password of mine'));
  });
});

describe('verifyPassword', () => {
  it('knows its own and no other', async () => {
    const hash = await hashPassword('a password of mine');
    expect(await verifyPassword(hash, 'a password of mine')).toBe(true);
    expect(await verifyPassword(hash, 'a password of yours')).toBe(false);
  });

  it('takes the same letters in either Unicode form', async () => {
    const composed = 'caf\u00e9 au lait noir';
    expect(await verifyPassword(await hashPassword(composed), composed.normalize('NFD'))).toBe(true);
  });

  it('refuses where there is none', async () => {
    expect(await verifyPassword(null, 'no password is this one')).toBe(false);
  });
});

describe('checkNewPassword', () => {
  const EMAIL = 'daria@fennimoor.example';

  it('takes a few words', () => {
    expect(checkNewPassword('four words in row', EMAIL)).toBeNull();
  });

  it.each(['short', 'aaaaaaaaaaaa', 'daria daria 1', 'x'.repeat(201)])('says what is wrong with %j', (password) => {
    expect(checkNewPassword(password, EMAIL)).not.toBeNull();
  });
});
