import { and, asc, desc, eq, inArray, isNull, ne, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, readings, submissions, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { CourseRole, SubmissionState } from '@/lib/vocabularies';
import { courseInReach, ownMembership } from './courses';

export interface Submission {
  readonly id: string;
  readonly assignmentId: string;
  readonly courseRole: CourseRole | null;
  readonly studentId: string;
  readonly studentName: string;
  readonly readingId: string;
  readonly readingVersion: number;
  readonly startTick: number;
  readonly endTick: number;
  readonly attempt: number;
  readonly state: SubmissionState;
  readonly handedInAt: Date | null;
  readonly releasedAt: Date | null;
  readonly points: number | null;
  readonly maxPoints: number | null;
}

const SUBMISSION_COLUMNS = {
  id: submissions.id,
  assignmentId: submissions.assignmentId,
  courseRole: courseMembers.role,
  studentId: submissions.studentId,
  studentName: users.name,
  readingId: submissions.readingId,
  readingVersion: readings.version,
  startTick: readings.startTick,
  endTick: readings.endTick,
  attempt: submissions.attempt,
  state: submissions.state,
  handedInAt: submissions.handedInAt,
  releasedAt: submissions.releasedAt,
  points: submissions.points,
  maxPoints: submissions.maxPoints,
};

function selectSubmissions(db: Db, actor: Actor) {
  return db
    .select(SUBMISSION_COLUMNS)
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(users, eq(users.id, submissions.studentId))
    .innerJoin(readings, eq(readings.id, submissions.readingId))
    .leftJoin(courseMembers, ownMembership(actor));
}

/** Points and dates of release are for the student only once released: before, they read as null. */
function unreleasedHidden(actor: Actor, submission: Submission): Submission {
  const own = submission.studentId === actor.userId && submission.courseRole === 'student';
  if (!own || submission.state === 'released') return submission;
  const state = submission.state === 'marked' ? 'handed_in' : submission.state;
  return { ...submission, state, points: null, maxPoints: null };
}

function within(actor: Actor) {
  return and(courseInReach(actor), isNull(assignments.deletedAt));
}

/** The actor's own submission as a student of the course. */
export async function findOwnSubmission(db: Db, actor: Actor, submissionId: string): Promise<Submission | null> {
  const own = and(eq(submissions.studentId, actor.userId), eq(courseMembers.role, 'student'));
  const [row] = await selectSubmissions(db, actor).where(and(eq(submissions.id, submissionId), own, within(actor), ne(assignments.state, 'draft')));
  return row ? unreleasedHidden(actor, row) : null;
}

/** A submission in a course where the actor marks. */
export async function findSubmissionToMark(db: Db, actor: Actor, submissionId: string): Promise<Submission | null> {
  const [row] = await selectSubmissions(db, actor).where(and(eq(submissions.id, submissionId), markedBy(actor), within(actor)));
  return row ?? null;
}

function markedBy(actor: Actor) {
  return actor.role === 'owner' ? undefined : inArray(courseMembers.role, ['instructor', 'assistant']);
}

/** The actor's attempts at an assignment, the first first. */
export async function listOwnSubmissions(db: Db, actor: Actor, assignmentId: string): Promise<Submission[]> {
  const rows = await selectSubmissions(db, actor)
    .where(and(eq(submissions.assignmentId, assignmentId), eq(submissions.studentId, actor.userId), within(actor)))
    .orderBy(asc(submissions.attempt));
  return rows.map((row) => unreleasedHidden(actor, row));
}

/** Every attempt at an assignment that the actor marks, by student. */
export async function listSubmissions(db: Db, actor: Actor, assignmentId: string): Promise<Submission[]> {
  return selectSubmissions(db, actor)
    .where(and(eq(submissions.assignmentId, assignmentId), markedBy(actor), within(actor)))
    .orderBy(asc(users.name), asc(users.id), asc(submissions.attempt));
}

/** Of several attempts the last one that was handed in counts. */
export function countingAttempts<S extends { readonly studentId: string; readonly attempt: number; readonly state: SubmissionState }>(
  all: readonly S[],
): S[] {
  const byStudent = new Map<string, S>();
  for (const submission of all) {
    if (submission.state === 'working') continue;
    const before = byStudent.get(submission.studentId);
    if (!before || submission.attempt > before.attempt) byStudent.set(submission.studentId, submission);
  }
  return [...byStudent.values()];
}

export interface OwnWork {
  readonly assignmentId: string;
  readonly assignmentTitle: string;
  readonly courseId: string;
  readonly courseTitle: string;
  readonly state: 'open' | 'closed';
  readonly opensAt: Date | null;
  readonly dueAt: Date | null;
  readonly closesAt: Date | null;
  readonly attempts: number;
  readonly submission: { readonly id: string; readonly state: SubmissionState; readonly attempt: number; readonly points: number | null; readonly maxPoints: number | null } | null;
}

/** A student's assignments in all their courses with how far they are, the next due first. */
export async function listOwnWork(db: Db, actor: Actor): Promise<OwnWork[]> {
  const latest = sql`(select max(s.attempt) from submissions s where s.assignment_id = ${assignments.id} and s.student_id = ${actor.userId})`;
  const rows = await db
    .select({
      assignmentId: assignments.id,
      assignmentTitle: assignments.title,
      courseId: courses.id,
      courseTitle: courses.title,
      state: assignments.state,
      opensAt: assignments.opensAt,
      dueAt: assignments.dueAt,
      closesAt: assignments.closesAt,
      attempts: assignments.attempts,
      submissionId: submissions.id,
      submissionState: submissions.state,
      attempt: submissions.attempt,
      points: submissions.points,
      maxPoints: submissions.maxPoints,
    })
    .from(assignments)
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(courseMembers, and(ownMembership(actor), eq(courseMembers.role, 'student')))
    .leftJoin(
      submissions,
      and(eq(submissions.assignmentId, assignments.id), eq(submissions.studentId, actor.userId), eq(submissions.attempt, latest)),
    )
    .where(and(eq(courses.departmentId, actor.departmentId), isNull(assignments.deletedAt), isNull(courses.archivedAt), inArray(assignments.state, ['open', 'closed'])))
    .orderBy(asc(assignments.state), sql`${assignments.dueAt} is null`, asc(assignments.dueAt), desc(assignments.createdAt));
  return rows.map(workOf);
}

interface WorkRow extends Omit<OwnWork, 'state' | 'submission'> {
  readonly state: 'draft' | 'open' | 'closed';
  readonly submissionId: string | null;
  readonly submissionState: SubmissionState | null;
  readonly attempt: number | null;
  readonly points: number | null;
  readonly maxPoints: number | null;
}

function workOf({ submissionId, submissionState, attempt, points, maxPoints, state, ...rest }: WorkRow): OwnWork {
  const isReleased = submissionState === 'released';
  const shown = submissionState === 'marked' ? 'handed_in' : submissionState;
  const submission =
    submissionId && shown && attempt !== null
      ? { id: submissionId, state: shown, attempt, points: isReleased ? points : null, maxPoints: isReleased ? maxPoints : null }
      : null;
  return { ...rest, state: state === 'open' ? 'open' : 'closed', submission };
}

/** Where to write to students whose submissions the caller may mark; people whose data was deleted are left out. */
export async function listAddresses(db: Db, userIds: readonly string[]): Promise<ReadonlyMap<string, { readonly name: string; readonly email: string }>> {
  if (userIds.length === 0) return new Map();
  const rows = await db
    .select({ id: users.id, name: users.name, email: users.email })
    .from(users)
    .where(and(inArray(users.id, [...userIds]), isNull(users.deletedAt)));
  return new Map(rows.map((row) => [row.id, row]));
}
