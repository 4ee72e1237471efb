import type { z } from 'zod';
import { type Course, type KnownPerson, findDepartmentMember, listRoster } from '@/db/queries/courses';
import { noteAudit } from '@/db/queries/audit';
import { courseMembers } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunCourse } from '@/lib/auth/permissions';
import type { AppError } from '@/lib/errors';
import { type Result, ok } from '@/lib/result';
import type { CourseRole, Role } from '@/lib/vocabularies';
import { findCourseFor } from './course-access';
import type { addPeopleInput } from './course-input';
import type { Deps } from './deps';
import { writeInvitation } from './invite';

export const ADDED = ['added', 'invited', 'already', 'refused'] as const;

/** What became of one row of a list. */
export interface AddedPerson {
  readonly email: string;
  readonly outcome: (typeof ADDED)[number];
  /** Why a row was refused. */
  readonly reason?: string;
}

/** What a member of the department can be in a course. */
const FITTING: Readonly<Record<Role, readonly CourseRole[]>> = {
  owner: ['instructor', 'assistant'],
  instructor: ['instructor', 'assistant'],
  assistant: ['assistant'],
  student: ['student'],
};

/** Adds a list of people: members of the department at once, others by an invitation mail. Each row has its own outcome. */
export async function addPeople(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof addPeopleInput>,
): Promise<Result<{ readonly courseId: string; readonly people: readonly AddedPerson[] }, AppError>> {
  const course = await findCourseFor(deps, actor, input.courseId, canRunCourse);
  if (!course.ok) return course;
  const roster = await listRoster(deps.db, actor, course.value.id);
  const seen = new Set(roster.map((row) => row.email));
  const people: AddedPerson[] = [];
  for (const { email } of input.people) {
    people.push(seen.has(email) ? { email, outcome: 'already' } : await addPerson(deps, actor, course.value, input.role, email));
    seen.add(email);
  }
  return ok({ courseId: course.value.id, people });
}

async function addPerson(deps: Deps, actor: Actor, course: Course, role: CourseRole, email: string): Promise<AddedPerson> {
  const known = await findDepartmentMember(deps.db, actor, email);
  if (known) return addMember(deps, actor, course, role, known);
  await writeInvitation(deps, actor, { email, role, course: { id: course.id, title: course.title } });
  return { email, outcome: 'invited' };
}

async function addMember(deps: Deps, actor: Actor, course: Course, role: CourseRole, person: KnownPerson): Promise<AddedPerson> {
  const { email, userId } = person;
  if (!FITTING[person.role].includes(role)) {
    return { email, outcome: 'refused', reason: `In the department this person is ${person.role}, and cannot be ${role} here.` };
  }
  await deps.db.insert(courseMembers).values({ courseId: course.id, userId, role, createdAt: deps.now() });
  await noteAudit(deps, actor, { verb: 'courses.add', subjectKind: 'user', subjectId: userId, details: { courseId: course.id, role } });
  return { email, outcome: 'added' };
}
