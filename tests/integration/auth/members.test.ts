import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { type AuditEvent, findSubjectNames, getAuditEvents } from '@/db/queries/audit';
import { listInvitations, listMembers } from '@/db/queries/members';
import { findActor, getMemberships } from '@/db/queries/users';
import { auditEvents, courseMembers, departmentMembers, outbox, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { verifyPassword } from '@/lib/auth/password';
import { unwrap } from '@/lib/result';
import { acceptInvitation } from '@/lib/workflows/accept-invitation';
import { changeMemberRole } from '@/lib/workflows/change-member-role';
import { chooseDepartment } from '@/lib/workflows/change-own-account';
import { writeInvitation } from '@/lib/workflows/invite';
import { INVITATION_DAYS } from '@/lib/workflows/invitation-mail';
import { inviteMember } from '@/lib/workflows/invite-member';
import { removeMember } from '@/lib/workflows/remove-member';
import { resendInvitation } from '@/lib/workflows/resend-invitation';
import { revokeInvitation } from '@/lib/workflows/revoke-invitation';
import { type TestServices, openServices } from '../../support/services';
import { addCourse, addDepartment, addPerson } from '../../support/world';

const DAY = 24 * 3600 * 1000;
const SIGNED_OUT = { actor: null, address: '192.0.2.1', session: null };

let services: TestServices;
let owner: Actor;
beforeAll(async () => void (services = await openServices()));
afterAll(() => services.close());

/** A department of its own for each test. */
beforeEach(async () => {
  const departmentId = await addDepartment(services.deps, 'Department');
  owner = await addPerson(services.deps, departmentId, 'owner', 'owner');
});

const failed = (code: string) => expect.objectContaining({ ok: false, error: expect.objectContaining({ code }) });
const person = (role: Actor['role'], mailbox: string) => addPerson(services.deps, owner.departmentId, role, mailbox);

let mailbox = 0;
const newEmail = () => `new-${(mailbox += 1)}@person.example`;

/** The token of the newest invitation mail to an address; the next one will be newer. */
async function tokenTo(email: string): Promise<string> {
  const mails = services.deps.db.select({ text: outbox.textBody }).from(outbox).where(eq(outbox.toAddress, email));
  const rows = await mails.orderBy(outbox.createdAt);
  services.clock.forward(1);
  const tokens = rows.map(({ text }) => /\/invitation\/([\w-]+)/.exec(text)?.[1] ?? '');
  return tokens.at(-1) ?? '';
}

const accept = (token: string, words: { name?: string; password?: string } = { name: 'New Person', password: 'a long password' }) =>
  acceptInvitation(services.deps, SIGNED_OUT, { token, ...words });

async function roleOf(userId: string): Promise<string | undefined> {
  const [row] = await services.deps.db
    .select({ role: departmentMembers.role })
    .from(departmentMembers)
    .where(and(eq(departmentMembers.userId, userId), eq(departmentMembers.departmentId, owner.departmentId)));
  return row?.role;
}

async function userOf(email: string) {
  const [row] = await services.deps.db.select().from(users).where(eq(users.email, email));
  return row;
}

describe('an invitation', () => {
  it('makes its new person a member with the role it names, once', async () => {
    const email = newEmail();
    await inviteMember(services.deps, owner, { email, role: 'assistant' });
    const token = await tokenTo(email);
    expect(await accept(token)).toEqual({ ok: true, value: { email, known: false } });
    const user = await userOf(email);
    expect(user).toMatchObject({ name: 'New Person', sessionEpoch: 0 });
    expect(await verifyPassword(user?.passwordHash ?? null, 'a long password')).toBe(true);
    expect(await roleOf(user?.id ?? '')).toBe('assistant');
    expect(await accept(token)).toEqual(failed('link_expired'));
  });

  it('says which fields are wrong, and can be accepted afterwards', async () => {
    const email = newEmail();
    await inviteMember(services.deps, owner, { email, role: 'student' });
    const token = await tokenTo(email);
    const refused = await accept(token, { password: 'short' });
    expect(refused).toMatchObject({ ok: false, error: { code: 'bad_input', fields: { name: expect.any(String), password: expect.any(String) } } });
    expect(await userOf(email)).toBeUndefined();
    expect(await accept(token)).toMatchObject({ ok: true });
  });

  it('puts into its course as well', async () => {
    const instructor = await person('instructor', 'teacher');
    const courseId = await addCourse(services.deps, owner.departmentId, services.deps.newId().slice(0, 18), [[instructor, 'instructor']]);
    const email = newEmail();
    await writeInvitation(services.deps, instructor, { email, role: 'student', course: { id: courseId, title: 'Course' } });
    await accept(await tokenTo(email));
    const [row] = await services.deps.db
      .select({ role: courseMembers.role })
      .from(courseMembers)
      .where(and(eq(courseMembers.courseId, courseId), eq(courseMembers.userId, (await userOf(email))?.id ?? '')));
    expect(row).toEqual({ role: 'student' });
  });

  it('adds a department to someone who has an account, and leaves name and password alone', async () => {
    const elsewhere = await addDepartment(services.deps, 'Elsewhere');
    const known = await addPerson(services.deps, elsewhere, 'instructor', 'known');
    await inviteMember(services.deps, owner, { email: known.email, role: 'student' });
    const accepted = await accept(await tokenTo(known.email), { name: 'Taken Over', password: 'stolen password' });
    expect(accepted).toEqual({ ok: true, value: { email: known.email, known: true } });
    expect(await userOf(known.email)).toMatchObject({ name: known.name, passwordHash: null });
    const memberships = await getMemberships(services.deps.db, known.userId);
    expect(memberships.map(({ role }) => role).sort()).toEqual(['instructor', 'student']);
  });

  it('never changes the role of a member', async () => {
    const email = newEmail();
    await inviteMember(services.deps, owner, { email, role: 'student' });
    const early = await tokenTo(email);
    await writeInvitation(services.deps, owner, { email, role: 'owner', course: null });
    await accept(await tokenTo(email));
    const user = await userOf(email);
    await changeMemberRole(services.deps, owner, { userId: user?.id ?? '', role: 'student' });
    await writeInvitation(services.deps, owner, { email, role: 'owner', course: null });
    await accept(await tokenTo(email));
    expect(await roleOf(user?.id ?? '')).toBe('student');
    expect(await accept(early)).toEqual(failed('link_expired'));
  });

  it('works for two weeks', async () => {
    const email = newEmail();
    await inviteMember(services.deps, owner, { email, role: 'student' });
    services.clock.forward(INVITATION_DAYS * DAY);
    expect(await accept(await tokenTo(email))).toEqual(failed('link_expired'));
  });

  it('sent again works anew, and the old link no more', async () => {
    const email = newEmail();
    const invited = await inviteMember(services.deps, owner, { email, role: 'student' });
    const old = await tokenTo(email);
    services.clock.forward(INVITATION_DAYS * DAY);
    await resendInvitation(services.deps, owner, { invitationId: invited.ok ? invited.value.invitationId : '' });
    expect(await accept(old)).toEqual(failed('link_expired'));
    expect(await accept(await tokenTo(email))).toMatchObject({ ok: true });
  });

  it('taken back does not work, and is not listed', async () => {
    const email = newEmail();
    const invited = await inviteMember(services.deps, owner, { email, role: 'student' });
    await revokeInvitation(services.deps, owner, { invitationId: invited.ok ? invited.value.invitationId : '' });
    expect(await accept(await tokenTo(email))).toEqual(failed('link_expired'));
    expect(await listInvitations(services.deps.db, owner)).toEqual([]);
  });

  it('is not sent to someone who is a member', async () => {
    expect(await inviteMember(services.deps, owner, { email: owner.email, role: 'student' })).toEqual(failed('already_there'));
  });

  it('of another department is not there', async () => {
    const invited = await inviteMember(services.deps, owner, { email: newEmail(), role: 'student' });
    const stranger = await addPerson(services.deps, await addDepartment(services.deps, 'Elsewhere'), 'owner', 'stranger');
    const input = { invitationId: invited.ok ? invited.value.invitationId : '' };
    expect(await resendInvitation(services.deps, stranger, input)).toEqual(failed('not_found'));
    expect(await revokeInvitation(services.deps, stranger, input)).toEqual(failed('not_found'));
    expect(await listInvitations(services.deps.db, stranger)).toEqual([]);
  });
});

describe('changeMemberRole', () => {
  it('keeps an owner in the department, also when two leave at once', async () => {
    expect(await changeMemberRole(services.deps, owner, { userId: owner.userId, role: 'student' })).toEqual(failed('in_use'));
    const second = await person('owner', 'second');
    const both = await Promise.all([
      changeMemberRole(services.deps, owner, { userId: owner.userId, role: 'instructor' }),
      changeMemberRole(services.deps, second, { userId: second.userId, role: 'instructor' }),
    ].map((leaving) => leaving.catch(() => null)));
    expect(both.filter((result) => result?.ok)).toHaveLength(1);
    const owners = (await listMembers(services.deps.db, owner)).filter(({ role }) => role === 'owner');
    expect(owners).toHaveLength(1);
  });

  it('takes the courses from someone who may not teach any more', async () => {
    const teacher = await person('instructor', 'teacher');
    const courseId = await addCourse(services.deps, owner.departmentId, services.deps.newId().slice(0, 18), [[teacher, 'instructor']]);
    const inCourse = () => services.deps.db.select({ role: courseMembers.role }).from(courseMembers).where(eq(courseMembers.courseId, courseId));
    await changeMemberRole(services.deps, owner, { userId: teacher.userId, role: 'assistant' });
    expect(await inCourse()).toEqual([{ role: 'assistant' }]);
    await changeMemberRole(services.deps, owner, { userId: teacher.userId, role: 'student' });
    expect(await inCourse()).toEqual([]);
  });

  it('is in the audit trail, without a name', async () => {
    const teacher = await person('instructor', 'teacher');
    await changeMemberRole(services.deps, owner, { userId: teacher.userId, role: 'assistant' });
    const [event] = await services.deps.db.select().from(auditEvents).where(eq(auditEvents.departmentId, owner.departmentId));
    expect(event).toMatchObject({ verb: 'members.change_role', actorId: owner.userId, subjectId: teacher.userId, details: { from: 'instructor', to: 'assistant' } });
    expect(JSON.stringify(event)).not.toContain(teacher.name);
  });
});

describe('the audit trail', () => {
  it('comes a page at a time, newest first, without losing events of the same moment', async () => {
    const invited = new Set<string>();
    for (let n = 0; n < 5; n += 1) {
      const result = await inviteMember(services.deps, owner, { email: newEmail(), role: 'student' });
      invited.add(unwrap(result).invitationId);
    }
    const pages: AuditEvent[][] = [];
    for (let n = 0; n < 3; n += 1) {
      pages.push(await getAuditEvents(services.deps.db, owner, pages.at(-1)?.at(-1) ?? null, 2));
    }
    expect(pages.map((page) => page.length)).toEqual([2, 2, 1]);
    expect(new Set(pages.flat().map((event) => event.subjectId))).toEqual(invited);
  });

  it('says what a member is called now', async () => {
    const teacher = await person('instructor', 'teacher');
    await changeMemberRole(services.deps, owner, { userId: teacher.userId, role: 'assistant' });
    const events = await getAuditEvents(services.deps.db, owner, null, 10);
    expect(await findSubjectNames(services.deps.db, events)).toEqual(new Map([[teacher.userId, teacher.name]]));
  });
});

describe('removeMember', () => {
  it('ends access at once, in the department and its courses', async () => {
    const student = await person('student', 'pupil');
    const courseId = await addCourse(services.deps, owner.departmentId, services.deps.newId().slice(0, 18), [[student, 'student']]);
    await removeMember(services.deps, owner, { userId: student.userId });
    expect(await findActor(services.deps.db, student.userId, 0)).toBeNull();
    expect(await services.deps.db.select().from(courseMembers).where(eq(courseMembers.courseId, courseId))).toEqual([]);
  });

  it('does not remove the last owner', async () => {
    expect(await removeMember(services.deps, owner, { userId: owner.userId })).toEqual(failed('in_use'));
  });
});

describe('chooseDepartment', () => {
  it('moves a person of two departments between them', async () => {
    const student = await person('student', 'pupil');
    const elsewhere = await addDepartment(services.deps, 'Elsewhere');
    await services.deps.db.insert(departmentMembers).values({ departmentId: elsewhere, userId: student.userId, role: 'instructor' });
    expect(await findActor(services.deps.db, student.userId, 0)).toMatchObject({ departmentId: owner.departmentId, role: 'student' });
    await chooseDepartment(services.deps, student, { departmentId: elsewhere });
    expect(await findActor(services.deps.db, student.userId, 0)).toMatchObject({ departmentId: elsewhere, role: 'instructor' });
  });
});
