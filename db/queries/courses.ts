import { and, asc, desc, eq, isNotNull, isNull, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { courseMembers, courses, departmentMembers, invitations, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { CourseRole, Role } from '@/lib/vocabularies';

/** A course as someone who belongs to it (or runs the department) sees it. */
export interface Course {
  readonly id: string;
  readonly title: string;
  readonly term: string;
  readonly code: string;
  /** Null for the defaults. */
  readonly conventions: ConventionSheet | null;
  readonly archivedAt: Date | null;
  /** The actor's role in it; null for an owner who is not in it. */
  readonly courseRole: CourseRole | null;
}

/** The actor's own row in the course, for joins. */
export function ownMembership(actor: Actor) {
  return and(eq(courseMembers.courseId, courses.id), eq(courseMembers.userId, actor.userId));
}

/** Courses within reach: the actor is in them, or runs the department they lie in. Needs the join `ownMembership`. */
export function courseInReach(actor: Actor) {
  const inDepartment = eq(courses.departmentId, actor.departmentId);
  return actor.role === 'owner' ? inDepartment : and(inDepartment, isNotNull(courseMembers.userId));
}

const COURSE_COLUMNS = {
  id: courses.id,
  title: courses.title,
  term: courses.term,
  code: courses.code,
  conventions: courses.conventions,
  archivedAt: courses.archivedAt,
  courseRole: courseMembers.role,
};

type CourseRow = Omit<Course, 'conventions'> & { readonly conventions: object | null };

/** What the column holds was checked when it was written: a whole sheet or null. */
function courseOf<R extends CourseRow>(row: R): Omit<R, 'conventions'> & { conventions: ConventionSheet | null } {
  return { ...row, conventions: row.conventions as ConventionSheet | null };
}

export interface ListedCourse extends Course {
  readonly students: number;
  readonly openAssignments: number;
  /** Handed in and not yet released. */
  readonly toMark: number;
}

/** Every course within reach, the running ones first. The counts are for those who teach in it. */
export async function listCourses(db: Db, actor: Actor): Promise<ListedCourse[]> {
  const rows = await db
    .select({
      ...COURSE_COLUMNS,
      students: sql<number>`(select count(*) from course_members s where s.course_id = ${courses.id} and s.role = 'student')`,
      openAssignments: sql<number>`(select count(*) from assignments a where a.course_id = ${courses.id} and a.state = 'open' and a.deleted_at is null)`,
      toMark: sql<number>`(select count(*) from submissions b join assignments a on a.id = b.assignment_id where a.course_id = ${courses.id} and a.deleted_at is null and b.state in ('handed_in', 'marked'))`,
    })
    .from(courses)
    .leftJoin(courseMembers, ownMembership(actor))
    .where(courseInReach(actor))
    .orderBy(asc(courses.archivedAt), asc(courses.title), asc(courses.id));
  return rows.map((row) => courseOf({ ...row, students: Number(row.students), openAssignments: Number(row.openAssignments), toMark: Number(row.toMark) }));
}

export async function findCourse(db: Db, actor: Actor, courseId: string): Promise<Course | null> {
  const [row] = await db
    .select(COURSE_COLUMNS)
    .from(courses)
    .leftJoin(courseMembers, ownMembership(actor))
    .where(and(eq(courses.id, courseId), courseInReach(actor)));
  return row ? courseOf(row) : null;
}

/** What a student types to join; for those who run the course. */
export async function findEnrolmentCode(db: Db, actor: Actor, courseId: string): Promise<string | null> {
  const [row] = await db
    .select({ code: courses.enrolmentCode })
    .from(courses)
    .leftJoin(courseMembers, ownMembership(actor))
    .where(and(eq(courses.id, courseId), courseInReach(actor), taughtBy(actor)));
  return row?.code ?? null;
}

function taughtBy(actor: Actor) {
  return actor.role === 'owner' ? undefined : or(eq(courseMembers.role, 'instructor'), eq(courseMembers.role, 'assistant'));
}

export interface RosterRow {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly courseRole: CourseRole;
  readonly joinedAt: Date;
}

/** Who is in the course; the caller has found the course as someone who teaches in it. */
export async function listRoster(db: Db, actor: Actor, courseId: string): Promise<RosterRow[]> {
  return db
    .select({
      userId: users.id,
      name: users.name,
      email: users.email,
      courseRole: courseMembers.role,
      joinedAt: courseMembers.createdAt,
    })
    .from(courseMembers)
    .innerJoin(users, eq(users.id, courseMembers.userId))
    .innerJoin(courses, eq(courses.id, courseMembers.courseId))
    .where(and(eq(courses.id, courseId), eq(courses.departmentId, actor.departmentId)))
    .orderBy(asc(courseMembers.role), asc(users.name), asc(users.id));
}

export interface PendingInvitation {
  readonly id: string;
  readonly email: string;
  readonly role: Role;
  readonly expiresAt: Date;
}

export async function listCourseInvitations(db: Db, actor: Actor, courseId: string): Promise<PendingInvitation[]> {
  return db
    .select({ id: invitations.id, email: invitations.email, role: invitations.role, expiresAt: invitations.expiresAt })
    .from(invitations)
    .where(
      and(
        eq(invitations.courseId, courseId),
        eq(invitations.departmentId, actor.departmentId),
        isNull(invitations.acceptedAt),
        isNull(invitations.revokedAt),
      ),
    )
    .orderBy(desc(invitations.createdAt));
}

export interface KnownPerson {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

/** A member of the actor's department by e-mail (lower case). */
export async function findDepartmentMember(db: Db, actor: Actor, email: string): Promise<KnownPerson | null> {
  const [row] = await db
    .select({ userId: users.id, name: users.name, email: users.email, role: departmentMembers.role })
    .from(users)
    .innerJoin(departmentMembers, eq(departmentMembers.userId, users.id))
    .where(and(eq(departmentMembers.departmentId, actor.departmentId), eq(users.email, email), isNull(users.deletedAt)));
  return row ?? null;
}

/** The running course of the actor's department with this enrolment code (upper case). */
export async function findCourseByCode(db: Db, actor: Actor, code: string): Promise<{ readonly id: string; readonly title: string } | null> {
  const [row] = await db
    .select({ id: courses.id, title: courses.title })
    .from(courses)
    .where(and(eq(courses.departmentId, actor.departmentId), eq(courses.enrolmentCode, code), isNull(courses.archivedAt)));
  return row ?? null;
}
