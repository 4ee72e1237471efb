import { and, asc, desc, eq, inArray, isNotNull, isNull, ne, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, marks, submissions, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { SpanMark } from '@/lib/marking/compare-with-key';
import type { SubmissionState, Verdict } from '@/lib/vocabularies';
import { courseInReach, ownMembership } from './courses';

/** A mark with what a person put in its place. */
export interface Mark {
  readonly id: string;
  readonly submissionId: string;
  readonly startTick: number;
  readonly endTick: number;
  readonly proposed: SpanMark;
  /** What holds: the override where there is one, or else what was proposed. */
  readonly verdict: Verdict;
  readonly points: number;
  readonly maxPoints: number;
  readonly overridden: boolean;
  readonly remark: string | null;
  /** Someone has looked at it. */
  readonly settled: boolean;
}

const MARK_COLUMNS = {
  id: marks.id,
  submissionId: marks.submissionId,
  startTick: marks.startTick,
  endTick: marks.endTick,
  proposed: marks.proposed,
  verdict: marks.verdict,
  points: marks.points,
  maxPoints: marks.maxPoints,
  overridePoints: marks.overridePoints,
  overrideVerdict: marks.overrideVerdict,
  remark: marks.remark,
  markedBy: marks.markedBy,
};

interface MarkRow extends Omit<Mark, 'proposed' | 'overridden' | 'settled'> {
  readonly proposed: object;
  readonly overridePoints: number | null;
  readonly overrideVerdict: Verdict | null;
  readonly markedBy: string | null;
}

function markOf({ overridePoints, overrideVerdict, markedBy, proposed, ...row }: MarkRow): Mark {
  return {
    ...row,
    proposed: proposed as SpanMark,
    verdict: overrideVerdict ?? row.verdict,
    points: overridePoints ?? row.points,
    overridden: overridePoints !== null || overrideVerdict !== null,
    settled: markedBy !== null,
  };
}

/** The marks of submissions that the caller may see, in order of time. */
export async function unsafeListMarks(db: Db, submissionIds: readonly string[]): Promise<Mark[]> {
  if (submissionIds.length === 0) return [];
  const rows = await db
    .select(MARK_COLUMNS)
    .from(marks)
    .where(inArray(marks.submissionId, [...submissionIds]))
    .orderBy(asc(marks.startTick), asc(marks.submissionId));
  return rows.map(markOf);
}

/** Remarks written before in the course, the most used first: to be used again. */
export async function listUsedRemarks(db: Db, actor: Actor, courseId: string): Promise<string[]> {
  const uses = sql<number>`count(*)`;
  const rows = await db
    .select({ remark: marks.remark, uses, last: sql`max(${marks.updatedAt})` })
    .from(marks)
    .innerJoin(submissions, eq(submissions.id, marks.submissionId))
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .where(and(eq(courses.id, courseId), eq(courses.departmentId, actor.departmentId), isNotNull(marks.remark), ne(marks.remark, '')))
    .groupBy(marks.remark)
    .orderBy(desc(uses), desc(sql`max(${marks.updatedAt})`))
    .limit(40);
  return rows.flatMap((row) => (row.remark ? [row.remark] : []));
}

export interface GradebookStudent {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
}

export interface GradebookCell {
  readonly submissionId: string;
  readonly assignmentId: string;
  readonly studentId: string;
  readonly attempt: number;
  readonly state: SubmissionState;
  readonly handedInAt: Date | null;
  /** What the marks sum up to now; null when nothing was marked. */
  readonly points: number | null;
  readonly maxPoints: number | null;
}

export async function listGradebookStudents(db: Db, actor: Actor, courseId: string): Promise<GradebookStudent[]> {
  return db
    .select({ userId: users.id, name: users.name, email: users.email })
    .from(courseMembers)
    .innerJoin(users, eq(users.id, courseMembers.userId))
    .innerJoin(courses, eq(courses.id, courseMembers.courseId))
    .where(and(eq(courses.id, courseId), eq(courses.departmentId, actor.departmentId), eq(courseMembers.role, 'student')))
    .orderBy(asc(users.name), asc(users.id));
}

/** Every submission of a course that the actor marks, with the sum of its marks. */
export async function listGradebookCells(db: Db, actor: Actor, courseId: string): Promise<GradebookCell[]> {
  const rows = await db
    .select({
      submissionId: submissions.id,
      assignmentId: submissions.assignmentId,
      studentId: submissions.studentId,
      attempt: submissions.attempt,
      state: submissions.state,
      handedInAt: submissions.handedInAt,
      points: sql<number | null>`(select sum(coalesce(m.override_points, m.points)) from marks m where m.submission_id = ${submissions.id})`,
      maxPoints: sql<number | null>`(select sum(m.max_points) from marks m where m.submission_id = ${submissions.id})`,
    })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .leftJoin(courseMembers, ownMembership(actor))
    .where(and(eq(courses.id, courseId), courseInReach(actor), isNull(assignments.deletedAt)));
  return rows.map((row) => ({ ...row, points: numberOf(row.points), maxPoints: numberOf(row.maxPoints) }));
}

function numberOf(value: number | string | null): number | null {
  return value === null ? null : Number(value);
}
