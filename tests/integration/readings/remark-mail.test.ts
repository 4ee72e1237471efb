import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { outbox } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { unwrap } from '@/lib/result';
import { chooseRemarkMail } from '@/lib/workflows/change-own-account';
import { addRemark, listRemarkPeople } from '@/lib/workflows/remarks';
import { findMentioned } from '@/lib/workflows/remark-mail';
import { type TestServices, openServices } from '../../support/services';
import { addDepartment, addExcerpt, addPerson, addReading, addScore } from '../../support/world';

let services: TestServices;
let author: Actor;
let colleague: Actor;
let owner: Actor;
let student: Actor;
let excerptId: string;
let readingId: string;

beforeAll(async () => {
  services = await openServices();
  const departmentId = await addDepartment(services.deps, 'Remarks');
  author = await addPerson(services.deps, departmentId, 'instructor', 'author');
  colleague = await addPerson(services.deps, departmentId, 'assistant', 'colleague');
  owner = await addPerson(services.deps, departmentId, 'instructor', 'owner of the reading');
  student = await addPerson(services.deps, departmentId, 'student', 'student');
  excerptId = await addExcerpt(services.deps, author, await addScore(services.deps, author));
});
afterAll(() => services.close());
beforeEach(async () => {
  await services.deps.db.delete(outbox);
  readingId = await addReading(services.deps, author.departmentId, excerptId, { ownerId: owner.userId, kind: 'person', shared: 'comment' });
});

const say = async (actor: Actor, body: string, threadId: string | null = null) =>
  unwrap(await addRemark(services.deps, actor, { readingId, body, labelId: null, barIndex: 0, threadId })).remarks;

async function mailed(): Promise<string[]> {
  const rows = await services.deps.db.select({ to: outbox.toAddress }).from(outbox);
  return rows.map((row) => row.to).sort();
}

describe('a remark is told by mail', () => {
  it('to whose reading it is, and to whom it names, once', async () => {
    await say(author, `@${colleague.name}, is this right? @${colleague.name}!`);
    expect(await mailed()).toEqual([colleague.email, owner.email].sort());
  });

  it('to those who wrote in the thread, never to its writer', async () => {
    const [head] = await say(colleague, 'Is this V?');
    await services.deps.db.delete(outbox);
    await say(owner, 'It is.', head!.id);
    expect(await mailed()).toEqual([colleague.email]);
  });

  it('without a word of what was written', async () => {
    await say(author, `A secret thought, @${colleague.name}`);
    const rows = await services.deps.db.select().from(outbox);
    expect(JSON.stringify(rows)).not.toContain('secret thought');
    expect(rows[0]!.textBody).toContain(`/desk/${readingId}`);
  });

  it('not to those who switched it off', async () => {
    unwrap(await chooseRemarkMail(services.deps, colleague, { remarkMail: false }));
    await say(author, `@${colleague.name}`);
    expect(await mailed()).toEqual([owner.email]);
    unwrap(await chooseRemarkMail(services.deps, colleague, { remarkMail: true }));
    await say(author, `@${colleague.name}`);
    expect((await mailed()).filter((to) => to === colleague.email)).toHaveLength(1);
  });

  it('not to those who cannot open the reading', async () => {
    const own = await addReading(services.deps, author.departmentId, excerptId, { ownerId: author.userId, kind: 'person' });
    unwrap(await addRemark(services.deps, author, { readingId: own, body: `@${colleague.name} @${student.name}`, labelId: null, barIndex: 0, threadId: null }));
    expect(await mailed()).toEqual([]);
  });
});

it('names who can be mentioned: whoever else may write remarks', async () => {
  const { people } = unwrap(await listRemarkPeople(services.deps, author, { readingId }));
  expect(people).toEqual([colleague.name, owner.name].sort());
  expect(await services.deps.db.select().from(outbox).where(eq(outbox.toAddress, student.email))).toEqual([]);
});

it.each([
  ['@Ann Lee, look', ['Ann Lee']],
  ['@ann lee look', ['Ann Lee']],
  ['@Ann', ['Ann']],
  ['@Anna', []],
  ['mail ann@example.org', []],
  ['@Ann and @Ann Lee', ['Ann', 'Ann Lee']],
])('in “%s” these are named', (body, expected) => {
  const people = [{ name: 'Ann' }, { name: 'Ann Lee' }];
  expect(findMentioned(body, people).map((p) => p.name)).toEqual(expected);
});
