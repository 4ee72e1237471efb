import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { isDuplicate } from '@/db/client';
import { migrateDb } from '@/db/migrate';
import { departments, labels, scores, users } from '@/db/schema';
import { type TestServices, openServices } from '../../support/services';
import { type World, createWorld } from '../../support/world';

let services: TestServices;
let world: World;
beforeAll(async () => {
  services = await openServices();
  world = await createWorld(services.deps);
});
afterAll(() => services.close());

async function addLabel(numeralText: string): Promise<string> {
  const id = services.deps.newId();
  await services.deps.db.insert(labels).values({
    id,
    readingId: world.privateReadingId,
    position: 9,
    startTick: 8,
    endTick: 12,
    keyTonicFifths: 0,
    keyMode: 'major',
    numeralText,
    state: 'changed',
  });
  return id;
}

describe('numeral columns', () => {
  it('tell ii from II, viio from viiø and ♭ from nothing', async () => {
    const { db } = services.deps;
    for (const text of ['ii', 'II', 'viio7', 'viiø7', 'bII']) await addLabel(text);
    const found = await db.select({ text: labels.numeralText }).from(labels).where(eq(labels.numeralText, 'II'));
    expect(found).toEqual([{ text: 'II' }]);
    const sevenths = await db.select({ text: labels.numeralText }).from(labels).where(eq(labels.numeralText, 'viiø7'));
    expect(sevenths).toEqual([{ text: 'viiø7' }]);
  });

  it('are compared by bytes, says the database itself', async () => {
    const [rows] = await services.deps.db.execute(
      sql`select collation_name as name from information_schema.columns where table_schema = database() and column_name = 'numeral_text'`,
    );
    expect(rows).toEqual([{ name: 'utf8mb4_bin' }, { name: 'utf8mb4_bin' }]);
  });
});

describe('e-mail columns', () => {
  it('take two people whose e-mails differ in an accent only, and no two with the same', async () => {
    const { db, newId } = services.deps;
    const add = (email: string) => db.insert(users).values({ id: newId(), email, name: 'Someone' });
    await add('jose@person.example');
    await add('jos\u00e9@person.example');
    const again = await add('jose@person.example').catch((error: unknown) => error);
    expect(isDuplicate(again)).toBe(true);
  });
});

describe('JSON columns', () => {
  it('give back the value that went in', async () => {
    const { db } = services.deps;
    const bars = [{ index: 0, number: '1a', start: 0, length: 4 }];
    await db.update(scores).set({ bars, refusal: { code: 'x', message: 'quote " and \u2669 and \\' } }).where(eq(scores.id, world.scoreId));
    const [row] = await db.select({ bars: scores.bars, refusal: scores.refusal, warnings: scores.warnings }).from(scores).where(eq(scores.id, world.scoreId));
    expect(row).toEqual({ bars, refusal: { code: 'x', message: 'quote " and \u2669 and \\' }, warnings: null });
  });

  it('start as what the schema says', async () => {
    const [row] = await services.deps.db.select({ settings: departments.settings }).from(departments).limit(1);
    expect(row?.settings).toEqual({});
  });

  it('refuse what is no JSON', async () => {
    const broken = services.deps.db.execute(sql`update departments set settings = '{'`);
    // Source: MariaDB error codes, 4025 ER_CONSTRAINT_FAILED (the driver has MySQL's names).
    await expect(broken).rejects.toMatchObject({ cause: { errno: 4025 } });
  });
});

describe('instants', () => {
  it('keep their milliseconds, in UTC', async () => {
    const { db } = services.deps;
    const instant = new Date('2026-03-29T01:30:00.123Z');
    await db.update(users).set({ emailVerifiedAt: instant }).where(eq(users.id, world.student.userId));
    const [row] = await db.select({ at: users.emailVerifiedAt }).from(users).where(eq(users.id, world.student.userId));
    expect(row?.at).toEqual(instant);
    const [text] = await db.execute(sql`select cast(email_verified_at as char) as text from users where id = ${world.student.userId}`);
    expect(text).toEqual([{ text: '2026-03-29 01:30:00.123' }]);
  });
});

describe('migrateDb', () => {
  it('does nothing to a database that is up to date, from two processes at once', async () => {
    await Promise.all([migrateDb(services.databaseUrl), migrateDb(services.databaseUrl)]);
    const [row] = await services.deps.db.select({ id: users.id }).from(users).where(eq(users.id, world.owner.userId));
    expect(row).toBeDefined();
  });
});
