import { courseMembers, courses, departmentMembers, departments, users } from '@/db/schema';
import { hashPassword } from '@/lib/auth/password';
import { COURSE_ROLES, type CourseRole, ROLES, type Role } from '@/lib/vocabularies';
import type { Deps } from '@/lib/workflows/deps';
import { seedId } from './seed-id';
import signIns from './sign-ins.json';

/** An invented department. Nobody in it exists. */
export const DEPARTMENT = { id: seedId('department'), name: 'Fennimoor College of Music, Music Theory', slug: 'fennimoor' };

export const DEMO_PASSWORD = signIns.password;

export interface Person {
  readonly id: string;
  readonly role: Role;
  readonly name: string;
  readonly email: string;
}

export const PEOPLE: readonly Person[] = signIns.people.map((person) => ({
  ...person,
  role: ROLES.find((role) => role === person.role) ?? unknownRole(person.role),
  id: seedId(`person ${person.email}`),
}));

function unknownRole(role: string): never {
  throw new Error(`db/seed/sign-ins.json: ${role} is no role`);
}

/** The person with this mailbox, for instance `t.wrenfield`. */
export function personOf(mailbox: string): Person {
  const person = PEOPLE.find(({ email }) => email.startsWith(`${mailbox}@`));
  if (!person) throw new Error(`nobody in db/seed/sign-ins.json is ${mailbox}`);
  return person;
}

const CHROMATIC_STUDENTS = 'a.dovell c.pettibrand d.lindquill e.fosburytan f.quillon g.ashbeck h.tressick i.merridown j.sarkeld';

export interface SeededCourse {
  readonly id: string;
  readonly title: string;
  readonly code: string;
  readonly term: string;
  readonly enrolmentCode: string | null;
  readonly instructor: readonly string[];
  readonly assistant: readonly string[];
  readonly student: readonly string[];
}

/** Members are mailboxes. `k.valderay` studies only in the first-year course: another course's student. */
export const COURSES = {
  chromatic: {
    id: seedId('course chromatic'),
    title: 'Harmony II: chromatic harmony',
    code: 'MUT 212',
    term: 'Autumn 2026',
    enrolmentCode: 'MADDER-212',
    instructor: ['t.wrenfield'],
    assistant: ['b.ollershaw'],
    student: CHROMATIC_STUDENTS.split(' '),
  },
  diatonic: {
    id: seedId('course diatonic'),
    title: 'Harmony I: diatonic harmony',
    code: 'MUT 111',
    term: 'Autumn 2026',
    enrolmentCode: 'VERDIGRIS-111',
    instructor: ['i.rookhope'],
    assistant: [],
    student: ['k.valderay', 'j.sarkeld', 'i.merridown'],
  },
  songs: {
    id: seedId('course songs'),
    title: 'Seminar: the nineteenth-century song',
    code: 'MUT 340',
    term: 'Spring 2027',
    enrolmentCode: null,
    instructor: ['i.rookhope', 't.wrenfield'],
    assistant: ['b.ollershaw'],
    student: ['a.dovell', 'f.quillon'],
  },
} as const satisfies Record<string, SeededCourse>;

function membersOf(course: SeededCourse): { readonly courseId: string; readonly userId: string; readonly role: CourseRole }[] {
  return COURSE_ROLES.flatMap((role) =>
    course[role].map((mailbox) => ({ courseId: course.id, userId: personOf(mailbox).id, role })),
  );
}

async function seedUsers(deps: Deps): Promise<void> {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const now = deps.now();
  for (const { id, email, name, role } of PEOPLE) {
    const [made] = await deps.db.insert(users).ignore().values({ id, email, name, passwordHash, emailVerifiedAt: now });
    // Whoever left the department since, or deleted their data, is not brought back.
    if (made.affectedRows === 0) continue;
    await deps.db.insert(departmentMembers).ignore().values({ departmentId: DEPARTMENT.id, userId: id, role });
  }
}

async function seedCourse(deps: Deps, course: SeededCourse): Promise<void> {
  const { id, title, code, term, enrolmentCode } = course;
  await deps.db.insert(courses).ignore().values({ id, title, code, term, enrolmentCode, departmentId: DEPARTMENT.id });
  await deps.db.insert(courseMembers).ignore().values(membersOf(course));
}

/** The department, its people and its courses. What is there already stays as it is. */
export async function seedPeople(deps: Deps): Promise<void> {
  await deps.db.insert(departments).ignore().values(DEPARTMENT);
  await seedUsers(deps);
  for (const course of Object.values(COURSES)) await seedCourse(deps, course);
}
