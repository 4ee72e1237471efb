import { eq } from 'drizzle-orm';
import Papa from 'papaparse';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findCourse, findEnrolmentCode, listCourses, listRoster } from '@/db/queries/courses';
import { outbox, users } from '@/db/schema';
import { unwrap } from '@/lib/result';
import { addPeople } from '@/lib/workflows/add-people';
import { setArchived, setEnrolment } from '@/lib/workflows/change-course';
import { createCourse } from '@/lib/workflows/create-course';
import { getGradebook } from '@/lib/workflows/gradebook';
import { formatGradebook } from '@/lib/workflows/gradebook-csv';
import { handIn } from '@/lib/workflows/hand-in';
import { joinCourse } from '@/lib/workflows/join-course';
import { removePerson } from '@/lib/workflows/remove-person';
import { type TestServices, openServices } from '../../support/services';
import { addPerson } from '../../support/world';
import { type CourseWorld, addOpenAssignment, createCourseWorld, writeAnswer } from './course-world';

let services: TestServices;
let world: CourseWorld;

beforeAll(async () => {
  services = await openServices();
  world = await createCourseWorld(services.deps);
});
afterAll(() => services.close());

const deps = () => services.deps;

async function newCourse(): Promise<string> {
  return unwrap(await createCourse(deps(), world.instructor, { title: 'Figured bass', term: 'Spring', code: 'FB' })).courseId;
}

describe('createCourse', () => {
  it('makes its maker its instructor', async () => {
    const courseId = await newCourse();
    expect((await findCourse(deps().db, world.instructor, courseId))?.courseRole).toBe('instructor');
    expect(await findCourse(deps().db, world.assistant, courseId)).toBeNull();
    expect((await listCourses(deps().db, world.assistant)).map((course) => course.id)).not.toContain(courseId);
  });

  it('is not for assistants', async () => {
    expect(await createCourse(deps(), world.assistant, { title: 'X', term: '', code: '' })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});

describe('addPeople', () => {
  it('adds members at once, invites others by mail, and says what became of every row', async () => {
    const courseId = await newCourse();
    const list = [world.outsider.email, 'someone.new@elsewhere.example', world.outsider.email, world.assistant.email];
    const { people } = unwrap(await addPeople(deps(), world.instructor, { courseId, role: 'student', people: list.map((email) => ({ name: '', email })) }));
    expect(people.map((person) => person.outcome)).toEqual(['added', 'invited', 'already', 'refused']);
    expect((await listRoster(deps().db, world.instructor, courseId)).map((row) => row.email)).toContain(world.outsider.email);
    const mails = await deps().db.select().from(outbox).where(eq(outbox.toAddress, 'someone.new@elsewhere.example'));
    expect(mails).toHaveLength(1);
  });
});

describe('joinCourse', () => {
  it('takes the code in any case until the instructor makes another', async () => {
    const courseId = await newCourse();
    const { code } = unwrap(await setEnrolment(deps(), world.instructor, { courseId, open: true }));
    const student = await addPerson(deps(), world.departmentId, 'student', 'joins');
    expect(unwrap(await joinCourse(deps(), student, { code: code! })).courseId).toBe(courseId);
    unwrap(await setEnrolment(deps(), world.instructor, { courseId, open: true }));
    const late = await addPerson(deps(), world.departmentId, 'student', 'late');
    expect(await joinCourse(deps(), late, { code: code! })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });

  it('is limited: codes cannot be guessed by trying', async () => {
    const guesser = await addPerson(deps(), world.departmentId, 'student', 'guesser');
    const tries = [];
    for (let i = 0; i < 11; i += 1) tries.push(await joinCourse(deps(), guesser, { code: `GUESS-${i}` }));
    expect(tries.at(0)).toMatchObject({ error: { code: 'not_found' } });
    expect(tries.at(-1)).toMatchObject({ error: { code: 'rate_limited' } });
  });

  it('ends with the course', async () => {
    const courseId = await newCourse();
    unwrap(await setEnrolment(deps(), world.instructor, { courseId, open: true }));
    unwrap(await setArchived(deps(), world.instructor, { courseId, archived: true }));
    expect(await findEnrolmentCode(deps().db, world.instructor, courseId)).toBeNull();
  });
});

describe('removePerson', () => {
  it('takes a student out, and keeps the last instructor', async () => {
    const courseId = await newCourse();
    unwrap(await addPeople(deps(), world.instructor, { courseId, role: 'student', people: [{ name: '', email: world.outsider.email }] }));
    unwrap(await removePerson(deps(), world.instructor, { courseId, userId: world.outsider.userId }));
    expect(await findCourse(deps().db, world.outsider, courseId)).toBeNull();
    const last = await removePerson(deps(), world.instructor, { courseId, userId: world.instructor.userId });
    expect(last).toMatchObject({ ok: false, error: { code: 'in_use' } });
  });
});

describe('the gradebook', () => {
  it('has every student’s counting attempt and exports names that a spreadsheet takes for no formula', async () => {
    const assignmentId = await addOpenAssignment(deps(), world);
    const [ada, ben] = world.students;
    await deps().db.update(users).set({ name: '=HYPERLINK("x")' }).where(eq(users.id, ben.userId));
    for (const [student, numerals] of [[ada, 'Cad64 V7 V65/V ii6'], [ben, 'Cad64 V V65/V _']] as const) {
      unwrap(await handIn(deps(), student, await writeAnswer(deps(), student, assignmentId, numerals)));
    }
    const gradebook = unwrap(await getGradebook(deps(), world.assistant, world.courseId));
    const rows = Papa.parse<string[]>(formatGradebook(gradebook).replace(/^\uFEFF/u, '').trim()).data;
    expect(rows[0]).toEqual(['Name', 'E-mail', 'Cadences: points', 'Cadences: of', 'Cadences: state', 'Sum: points', 'Sum: of']);
    expect(rows.find((row) => row[1] === ada.email)?.slice(2)).toEqual(['8', '8', 'handed in', '8', '8']);
    expect(rows.find((row) => row[1] === ben.email)?.[0]).toBe(`'=HYPERLINK("x")`);
    expect(rows.find((row) => row[1] === world.students[2].email)?.slice(2)).toEqual(['', '', 'nothing handed in', '0', '0']);
    expect(await getGradebook(deps(), ada, world.courseId)).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});
