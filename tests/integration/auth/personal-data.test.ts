import { unzipSync } from 'fflate';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findActor } from '@/db/queries/users';
import { outbox, readings, submissions, users } from '@/db/schema';
import { hashPassword } from '@/lib/auth/password';
import { unwrap } from '@/lib/result';
import { ERASED_NAME } from '@/lib/workflows/erase-person';
import { eraseMember } from '@/lib/workflows/erase-member';
import { eraseOwnAccount } from '@/lib/workflows/erase-own-account';
import { exportDepartment } from '@/lib/workflows/export-department';
import { exportMember, exportOwnData } from '@/lib/workflows/export-person';
import { type TestServices, openServices } from '../../support/services';
import { MUSIC_BYTES, SECRET_TITLE, type World, addReading, createWorld } from '../../support/world';

let services: TestServices;
let passwordHash: string;
beforeAll(async () => {
  services = await openServices();
  passwordHash = await hashPassword('a password of the tests');
});
afterAll(() => services.close());

/** A world whose people all have a password. */
async function openWorld(): Promise<World> {
  const world = await createWorld(services.deps);
  await services.deps.db.update(users).set({ passwordHash });
  return world;
}

async function textOf(result: Awaited<ReturnType<typeof exportOwnData>>): Promise<string> {
  return unwrap(result).text();
}

describe('exportOwnData', () => {
  it('holds what the student has done, and no secret', async () => {
    const world = await openWorld();
    const text = await textOf(await exportOwnData(services.deps, world.student));
    const kept = JSON.parse(text) as { account: { email: string }; submissions: { state: string }[]; readings: { kind: string }[] };
    expect(kept.account.email).toBe(world.student.email);
    expect(kept.submissions.map(({ state }) => state).sort()).toEqual(['handed_in', 'working']);
    expect(kept.readings.map(({ kind }) => kind)).toEqual(['submission', 'submission']);
    expect(text).not.toContain('argon2');
  });

  it('holds no mark before it is released', async () => {
    const world = await openWorld();
    const marksOf = async () => {
      const text = await textOf(await exportOwnData(services.deps, world.student));
      const kept = JSON.parse(text) as { submissions: { id: string; points: number | null; marks: unknown[] }[] };
      return kept.submissions.find(({ id }) => id === world.handedSubmissionId);
    };
    expect(await marksOf()).toMatchObject({ points: null, marks: [] });
    await services.deps.db.update(submissions).set({ state: 'released' }).where(eq(submissions.id, world.handedSubmissionId));
    const released = await marksOf();
    expect(released?.marks).toHaveLength(2);
    expect(released?.points).not.toBeNull();
  });

  it('holds nothing of another person', async () => {
    const world = await openWorld();
    const text = await textOf(await exportOwnData(services.deps, world.classmate));
    expect(text).not.toContain(world.student.userId);
    expect(text).not.toContain(world.instructor.name);
  });
});

describe('exportMember', () => {
  it('gives the owner what the department keeps of one person', async () => {
    const world = await openWorld();
    const text = await textOf(await exportMember(services.deps, world.owner, { userId: world.student.userId }));
    expect(text).toContain(world.student.email);
    expect(text).not.toContain(world.classmate.email);
  });
});

describe('exportDepartment', () => {
  it('is an archive of every row and file of the department, without secrets', async () => {
    const world = await openWorld();
    const response = unwrap(await exportDepartment(services.deps, world.owner));
    const files = unzipSync(new Uint8Array(await response.arrayBuffer()));
    const lines = (name: string) => new TextDecoder().decode(files[`${name}.ndjson`]).trim().split('\n').filter(Boolean).map((line) => JSON.parse(line) as Record<string, unknown>);
    expect(lines('members')).toHaveLength(7);
    expect(lines('courses').map((course) => course['members'])).toContainEqual(expect.arrayContaining([expect.objectContaining({ userId: world.student.userId })]));
    expect(lines('submissions')).toHaveLength(2);
    expect(lines('marks')).toHaveLength(2);
    const key = lines('readings').find((reading) => reading['id'] === world.keyReadingId);
    expect(key?.['labels']).toEqual([expect.objectContaining({ numeralText: 'I' }), expect.objectContaining({ numeralText: 'V' })]);
    const score = Object.entries(files).find(([name]) => name.startsWith('files/'));
    expect(score?.[1]).toEqual(MUSIC_BYTES);
    const whole = Object.values(files).map((bytes) => new TextDecoder().decode(bytes)).join('');
    expect(whole).not.toContain('argon2');
    expect(whole).not.toContain(world.otherOwner.email);
    expect(lines('invitations')[0]).not.toHaveProperty('tokenHash');
  });

  it('reads past the first page', async () => {
    const world = await openWorld();
    for (let n = 0; n < 205; n += 1) await addReading(services.deps, world.departmentId, world.excerptId, { ownerId: null, kind: 'engine' });
    const response = unwrap(await exportDepartment(services.deps, world.owner));
    const files = unzipSync(new Uint8Array(await response.arrayBuffer()));
    const readingsKept = new TextDecoder().decode(files['readings.ndjson']).trim().split('\n');
    expect(readingsKept).toHaveLength(5 + 2 + 205);
    expect(new Set(readingsKept).size).toBe(readingsKept.length);
  });
});

describe('eraseOwnAccount', () => {
  const leave = (world: World, current = 'a password of the tests') =>
    eraseOwnAccount(services.deps, { actor: world.student, address: '192.0.2.1', session: { method: 'password', signedInAt: services.deps.now() } }, { current });

  it('asks for the password', async () => {
    const world = await openWorld();
    expect(await leave(world, 'wrong')).toMatchObject({ ok: false, error: { code: 'bad_credentials' } });
    expect(await findActor(services.deps.db, world.student.userId, 0)).not.toBeNull();
  });

  it('leaves nothing that says who it was', async () => {
    const world = await openWorld();
    const { db } = services.deps;
    await db.insert(outbox).values({ id: services.deps.newId(), toAddress: world.student.email, subject: 'To them', textBody: 'x' });
    expect(await leave(world)).toEqual({ ok: true, value: null });
    const [row] = await db.select().from(users).where(eq(users.id, world.student.userId));
    expect(row).toMatchObject({ name: ERASED_NAME, passwordHash: null, preferences: {} });
    expect(JSON.stringify(row)).not.toContain('student@');
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, world.student.email))).toEqual([]);
    expect(await findActor(db, world.student.userId, 0)).toBeNull();
    expect(await findActor(db, world.student.userId, 1)).toBeNull();
  });

  it('deletes what nobody else saw, and keeps handed-in work without the name', async () => {
    const world = await openWorld();
    const { db } = services.deps;
    await leave(world);
    const left = await db.select({ id: submissions.id }).from(submissions).where(eq(submissions.studentId, world.student.userId));
    expect(left).toEqual([{ id: world.handedSubmissionId }]);
    const kept = await db.select({ kind: readings.kind }).from(readings).where(eq(readings.ownerId, world.student.userId));
    expect(kept).toEqual([{ kind: 'submission' }]);
  });
});

describe('eraseMember', () => {
  it('deletes an instructor’s private readings and keeps keys and shared ones', async () => {
    const world = await openWorld();
    expect(await eraseMember(services.deps, world.owner, { userId: world.instructor.userId })).toEqual({ ok: true, value: null });
    const kept = await services.deps.db.select({ id: readings.id, title: readings.title }).from(readings).where(eq(readings.ownerId, world.instructor.userId));
    expect(kept.map(({ id }) => id).sort()).toEqual([world.discussedReadingId, world.sharedReadingId, world.keyReadingId].sort());
    expect(kept[0]?.title).toBe(SECRET_TITLE);
  });

  it('is not for oneself', async () => {
    const world = await openWorld();
    expect(await eraseMember(services.deps, world.owner, { userId: world.owner.userId })).toMatchObject({ ok: false, error: { code: 'in_use' } });
  });
});
