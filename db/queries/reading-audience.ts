import { and, asc, eq, isNull, ne, or } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, departmentMembers, submissions, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRemarkOnReading } from '@/lib/auth/permissions';
import type { CourseRole } from '@/lib/vocabularies';
import type { ReadingHead } from './readings';

/** Someone who may take part in what is said about a reading. */
export interface Listener {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  /** Wants mail about remarks. */
  readonly wantsMail: boolean;
}

/** Everyone who may write remarks on a reading that the actor sees, by name, the actor included. */
export async function listAudience(db: Db, actor: Actor, head: ReadingHead): Promise<Listener[]> {
  const members = await db
    .select({ userId: users.id, name: users.name, email: users.email, preferences: users.preferences, role: departmentMembers.role })
    .from(departmentMembers)
    .innerJoin(users, eq(users.id, departmentMembers.userId))
    .where(
      and(
        eq(departmentMembers.departmentId, actor.departmentId),
        isNull(users.deletedAt),
        or(ne(departmentMembers.role, 'student'), ...(head.ownerId ? [eq(users.id, head.ownerId)] : [])),
      ),
    )
    .orderBy(asc(users.name), asc(users.id));
  const roles = await listRolesAround(db, actor, head);
  return members.flatMap(({ preferences, role, ...person }) => {
    const courseRoles = roles.filter((each) => each.userId === person.userId).map((each) => each.role);
    const listens = canRemarkOnReading({ ...person, role, departmentId: actor.departmentId }, { ...head.access, courseRoles });
    return listens ? [{ ...person, wantsMail: preferences.remarkMail ?? true }] : [];
  });
}

/** Roles in the courses whose assignments use the reading as key or submission. */
async function listRolesAround(db: Db, actor: Actor, { id, kind }: ReadingHead): Promise<{ userId: string; role: CourseRole }[]> {
  if (kind !== 'key' && kind !== 'submission') return [];
  const uses = kind === 'key' ? eq(assignments.keyReadingId, id) : eq(submissions.readingId, id);
  return db
    .selectDistinct({ userId: courseMembers.userId, role: courseMembers.role })
    .from(assignments)
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(courseMembers, eq(courseMembers.courseId, courses.id))
    .leftJoin(submissions, eq(submissions.assignmentId, assignments.id))
    .where(and(uses, eq(courses.departmentId, actor.departmentId), isNull(assignments.deletedAt)));
}
