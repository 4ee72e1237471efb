import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { findActor } from '@/db/queries/users';
import { accounts, outbox, signInAttempts, signInLinks, users } from '@/db/schema';
import type { Visitor } from '@/lib/auth/actor';
import { hashPassword } from '@/lib/auth/password';
import { LIMITS } from '@/lib/auth/rate-limit';
import { changePassword } from '@/lib/workflows/change-password';
import { signOutEverywhere } from '@/lib/workflows/change-own-account';
import { LINK_MINUTES, requestSignInLink } from '@/lib/workflows/request-sign-in-link';
import { signInWithLink } from '@/lib/workflows/sign-in-with-link';
import { signInWithPassword } from '@/lib/workflows/sign-in-with-password';
import { signInWithProvider } from '@/lib/workflows/sign-in-with-provider';
import { type TestServices, openServices } from '../../support/services';
import { addDepartment, addPerson } from '../../support/world';

const MINUTE = 60_000;
const PASSWORD = 'a password of the tests';
const ADDRESS = '192.0.2.7';

let services: TestServices;
let passwordHash: string;
beforeAll(async () => {
  services = await openServices();
  passwordHash = await hashPassword(PASSWORD);
});
afterAll(() => services.close());

/** Nobody has tried anything yet. */
beforeEach(async () => void (await services.deps.db.delete(signInAttempts)));

async function addAccount(hash: string | null = passwordHash) {
  const { deps } = services;
  const departmentId = await addDepartment(deps, 'Department');
  const person = await addPerson(deps, departmentId, 'instructor', 'person');
  await deps.db.update(users).set({ passwordHash: hash }).where(eq(users.id, person.userId));
  return person;
}

const enter = (email: string, password = PASSWORD, address = ADDRESS) => signInWithPassword(services.deps, { email, password, address });

const failed = (code: string) => expect.objectContaining({ ok: false, error: expect.objectContaining({ code }) });

function visitor(actor: Visitor['actor'], method: 'password' | 'link' = 'password'): Visitor {
  return { actor, address: ADDRESS, session: { method, signedInAt: services.deps.now() } };
}

describe('signInWithPassword', () => {
  it('takes the e-mail in any case and with spaces round it', async () => {
    const { email, userId } = await addAccount();
    expect(await enter(` ${email.toUpperCase()} `)).toEqual({ ok: true, value: { userId, epoch: 0 } });
  });

  it('answers a wrong password, an unknown e-mail, an account without a password and a deleted one alike', async () => {
    const known = await addAccount();
    const without = await addAccount(null);
    const deleted = await addAccount();
    await services.deps.db.update(users).set({ deletedAt: services.deps.now() }).where(eq(users.id, deleted.userId));
    const answers = [await enter(known.email, 'wrong'), await enter('nobody@nowhere.example'), await enter(without.email), await enter(deleted.email)];
    for (const answer of answers) expect(answer).toEqual({ ok: false, error: { code: 'bad_credentials' } });
  });

  it('stops after the allowed failures, even for the right password, and lets the person in again later', async () => {
    const { email } = await addAccount();
    for (let n = 0; n < LIMITS.password.perEmail; n += 1) expect(await enter(email, 'wrong', `192.0.2.${n}`)).toEqual(failed('bad_credentials'));
    expect(await enter(email)).toEqual(failed('rate_limited'));
    services.clock.forward(LIMITS.password.minutes * MINUTE + 1);
    expect(await enter(email)).toMatchObject({ ok: true });
  });

  it('lets no more through when all come at once', async () => {
    const { email } = await addAccount();
    const answers = await Promise.all(Array.from({ length: 20 }, () => enter(email, 'wrong')));
    const tried = answers.filter((answer) => !answer.ok && answer.error.code === 'bad_credentials');
    expect(tried.length).toBeLessThanOrEqual(LIMITS.password.perEmail);
  });

  it('stops an address that tries many accounts, and no other address', async () => {
    const { email } = await addAccount();
    const now = services.deps.now();
    const first = await enter('someone@nowhere.example', 'wrong');
    expect(first).toEqual(failed('bad_credentials'));
    const [row] = await services.deps.db.select({ addressHash: signInAttempts.addressHash }).from(signInAttempts);
    const rows = Array.from({ length: LIMITS.password.perAddress }, (_, n) => ({
      id: services.deps.newId(),
      kind: 'password' as const,
      emailHash: String(n).padStart(64, '0'),
      addressHash: row?.addressHash ?? '',
      succeeded: false,
      createdAt: now,
    }));
    await services.deps.db.insert(signInAttempts).values(rows);
    expect(await enter(email)).toEqual(failed('rate_limited'));
    expect(await enter(email, PASSWORD, '198.51.100.1')).toMatchObject({ ok: true });
  });

  it('counts no success as a failure', async () => {
    const { email } = await addAccount();
    for (let n = 0; n <= LIMITS.password.perEmail; n += 1) expect(await enter(email)).toMatchObject({ ok: true });
  });

  it('keeps neither the e-mail nor the address', async () => {
    const { email } = await addAccount();
    await enter(email);
    const kept = JSON.stringify(await services.deps.db.select().from(signInAttempts));
    expect(kept).not.toContain(email);
    expect(kept).not.toContain(ADDRESS);
  });

  it('forgets tries that no limit looks at any more', async () => {
    const { email } = await addAccount();
    await enter(email, 'wrong');
    services.clock.forward(61 * MINUTE);
    await enter(email);
    expect(await services.deps.db.select({ succeeded: signInAttempts.succeeded }).from(signInAttempts)).toEqual([{ succeeded: true }]);
  });
});

/** The newest link to an address; the next one will be newer. */
async function linkOf(email: string): Promise<string | null> {
  const mails = services.deps.db.select({ text: outbox.textBody }).from(outbox).where(eq(outbox.toAddress, email));
  const rows = await mails.orderBy(outbox.createdAt);
  services.clock.forward(1);
  return /token=([\w-]+)/.exec(rows.at(-1)?.text ?? '')?.[1] ?? null;
}

async function askForLink(email: string): Promise<string> {
  await requestSignInLink(services.deps, { actor: null, address: ADDRESS, session: null }, { email });
  return (await linkOf(email)) ?? '';
}

const useLink = (token: string) => signInWithLink(services.deps, { token, address: ADDRESS });

describe('a link by mail', () => {
  it('signs in once', async () => {
    const { email, userId } = await addAccount(null);
    const token = await askForLink(email);
    expect(await useLink(token)).toEqual({ ok: true, value: { userId, epoch: 0 } });
    expect(await useLink(token)).toEqual(failed('link_expired'));
  });

  it('signs in one of two that use it at once', async () => {
    const token = await askForLink((await addAccount()).email);
    const answers = await Promise.all([useLink(token), useLink(token), useLink(token)]);
    expect(answers.filter((answer) => answer.ok)).toHaveLength(1);
  });

  it('does not work after its time', async () => {
    const token = await askForLink((await addAccount()).email);
    services.clock.forward(LINK_MINUTES * MINUTE);
    expect(await useLink(token)).toEqual(failed('link_expired'));
  });

  it('is not in the database', async () => {
    const token = await askForLink((await addAccount()).email);
    expect(JSON.stringify(await services.deps.db.select().from(signInLinks))).not.toContain(token);
  });

  it('is not sent to someone unknown, who gets the same answer', async () => {
    const visitorOut = { actor: null, address: ADDRESS, session: null };
    const answer = await requestSignInLink(services.deps, visitorOut, { email: 'nobody@nowhere.example' });
    expect(answer).toEqual({ ok: true, value: { email: 'nobody@nowhere.example' } });
    expect(await linkOf('nobody@nowhere.example')).toBeNull();
  });

  it('is sent a few times an hour at most', async () => {
    const { email } = await addAccount();
    for (let n = 0; n < LIMITS.link_request.perEmail; n += 1) await askForLink(email);
    const out = await requestSignInLink(services.deps, { actor: null, address: ADDRESS, session: null }, { email });
    expect(out).toEqual(failed('rate_limited'));
  });

  it('still works while the password is locked by someone’s guessing', async () => {
    const { email } = await addAccount();
    for (let n = 0; n <= LIMITS.password.perEmail; n += 1) await enter(email, 'wrong');
    expect(await enter(email)).toEqual(failed('rate_limited'));
    expect(await useLink(await askForLink(email))).toMatchObject({ ok: true });
  });
});

describe('a session', () => {
  it('ends when the password changes', async () => {
    const { db } = services.deps;
    const person = await addAccount();
    expect(await findActor(db, person.userId, 0)).toEqual(person);
    const changed = await changePassword(services.deps, visitor(person), { current: PASSWORD, password: 'another long password' });
    expect(changed).toEqual({ ok: true, value: { email: person.email } });
    expect(await findActor(db, person.userId, 0)).toBeNull();
    expect(await enter(person.email)).toEqual(failed('bad_credentials'));
    const again = await enter(person.email, 'another long password');
    expect(again).toMatchObject({ ok: true, value: { epoch: 1 } });
    expect(await findActor(db, person.userId, 1)).toEqual(person);
  });

  it('does not change the password of someone who cannot say the old one', async () => {
    const person = await addAccount();
    const refused = await changePassword(services.deps, visitor(person), { current: 'wrong', password: 'another long password' });
    expect(refused).toEqual(failed('bad_credentials'));
    expect(await enter(person.email)).toMatchObject({ ok: true });
  });

  it('by a fresh link may choose a new password without the old one, and not an hour later', async () => {
    const person = await addAccount();
    const byLink = visitor(person, 'link');
    services.clock.forward(60 * MINUTE);
    expect(await changePassword(services.deps, byLink, { current: '', password: 'another long password' })).toEqual(failed('bad_credentials'));
    expect(await changePassword(services.deps, visitor(person, 'link'), { current: '', password: 'another long password' })).toMatchObject({ ok: true });
  });

  it('ends on every device, and so do the links on their way', async () => {
    const person = await addAccount();
    const token = await askForLink(person.email);
    await signOutEverywhere(services.deps, person);
    expect(await findActor(services.deps.db, person.userId, 0)).toBeNull();
    expect(await useLink(token)).toEqual(failed('link_expired'));
  });

  it('is nobody’s once the person belongs to no department', async () => {
    const person = await addAccount();
    await services.deps.db.execute(sql`delete from department_members where user_id = ${person.userId}`);
    expect(await findActor(services.deps.db, person.userId, 0)).toBeNull();
  });
});

describe('signInWithProvider', () => {
  const identity = (email: string | null, subject: string, emailVerified = true) =>
    signInWithProvider(services.deps, { issuer: 'https://id.example', subject, email, emailVerified });

  it('knows a person by their verified e-mail, and from then on by the identity alone', async () => {
    const { email, userId } = await addAccount(null);
    expect(await identity(email.toUpperCase(), 'subject-1')).toEqual({ ok: true, value: { userId, epoch: 0 } });
    expect(await identity('changed@elsewhere.example', 'subject-1', false)).toMatchObject({ ok: true, value: { userId } });
    const rows = await services.deps.db.select({ subject: accounts.providerAccountId }).from(accounts).where(eq(accounts.userId, userId));
    expect(rows).toEqual([{ subject: 'subject-1' }]);
  });

  it('takes no unverified e-mail, no stranger, nobody without an e-mail', async () => {
    const { email } = await addAccount(null);
    expect(await identity(email, 'subject-2', false)).toEqual(failed('bad_credentials'));
    expect(await identity('stranger@elsewhere.example', 'subject-3')).toEqual(failed('bad_credentials'));
    expect(await identity(null, 'subject-4')).toEqual(failed('bad_credentials'));
  });
});
