import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, excerpts, questions, readings, scores, submissions, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { type ReadingAccess, canSeeReading } from '@/lib/auth/permissions';
import type { ReadingKind, ReadingState, Segmentation, Sharing } from '@/lib/vocabularies';

/** A reading's own row, with what decides who may do what with it. */
export interface ReadingHead {
  readonly id: string;
  readonly title: string;
  readonly kind: ReadingKind;
  readonly state: ReadingState;
  readonly shared: Sharing;
  readonly version: number;
  readonly ownerId: string | null;
  readonly ownerName: string | null;
  readonly startTick: number;
  readonly endTick: number;
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly scoreId: string;
  readonly scoreTitle: string;
  readonly composer: string;
  readonly access: ReadingAccess;
}

const HEAD_COLUMNS = {
  id: readings.id,
  title: readings.title,
  kind: readings.kind,
  state: readings.state,
  shared: readings.shared,
  version: readings.version,
  ownerId: readings.ownerId,
  ownerName: users.name,
  startTick: readings.startTick,
  endTick: readings.endTick,
  excerptId: excerpts.id,
  excerptTitle: excerpts.title,
  firstBar: excerpts.firstBar,
  lastBar: excerpts.lastBar,
  scoreId: scores.id,
  scoreTitle: scores.title,
  composer: scores.composer,
};

/** The reading, when the actor may see it; null otherwise, whatever the reason. `now` decides whether work is still taken. */
export async function findReading(db: Db, actor: Actor, readingId: string, now: Date): Promise<ReadingHead | null> {
  const [row] = await db
    .select(HEAD_COLUMNS)
    .from(readings)
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .leftJoin(users, eq(users.id, readings.ownerId))
    .where(and(eq(readings.id, readingId), eq(readings.departmentId, actor.departmentId), isNull(readings.deletedAt)));
  if (!row) return null;
  const { kind, ownerId, shared } = row;
  const access: ReadingAccess = { kind, ownerId, shared, ...(await findCourseAccess(db, actor, readingId, kind, now)) };
  return canSeeReading(actor, access) ? { ...row, access } : null;
}

/** Holds the reading's row until the transaction ends, so that edits come one after another. False when there is none. */
export async function lockReading(db: Db, actor: Actor, readingId: string): Promise<boolean> {
  const rows = await db
    .select({ id: readings.id })
    .from(readings)
    .where(and(eq(readings.id, readingId), eq(readings.departmentId, actor.departmentId), isNull(readings.deletedAt)))
    .for('update');
  return rows.length > 0;
}

type CourseAccess = Pick<ReadingAccess, 'courseRoles' | 'keyShown' | 'working'>;

async function findCourseAccess(db: Db, actor: Actor, readingId: string, kind: ReadingKind, now: Date): Promise<CourseAccess> {
  if (kind === 'key') {
    return { courseRoles: await listKeyRoles(db, actor, readingId), keyShown: await isKeyShown(db, actor, readingId) };
  }
  if (kind !== 'submission') return { courseRoles: [] };
  return { courseRoles: await listSubmissionRoles(db, actor, readingId), working: await isWorking(db, readingId, now) };
}

function ownIn(actor: Actor) {
  return and(eq(courseMembers.courseId, courses.id), eq(courseMembers.userId, actor.userId), eq(courses.departmentId, actor.departmentId));
}

async function listKeyRoles(db: Db, actor: Actor, readingId: string) {
  const rows = await db
    .selectDistinct({ role: courseMembers.role })
    .from(assignments)
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(courseMembers, ownIn(actor))
    .where(and(eq(assignments.keyReadingId, readingId), isNull(assignments.deletedAt)));
  return rows.map((row) => row.role);
}

async function listSubmissionRoles(db: Db, actor: Actor, readingId: string) {
  const rows = await db
    .selectDistinct({ role: courseMembers.role })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(courseMembers, ownIn(actor))
    .where(and(eq(submissions.readingId, readingId), isNull(assignments.deletedAt)));
  return rows.map((row) => row.role);
}

async function isKeyShown(db: Db, actor: Actor, readingId: string): Promise<boolean> {
  const [row] = await db
    .select({ id: submissions.id })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .where(
      and(
        eq(assignments.keyReadingId, readingId),
        eq(assignments.showKeyAfterRelease, true),
        eq(submissions.studentId, actor.userId),
        eq(submissions.state, 'released'),
      ),
    )
    .limit(1);
  return row !== undefined;
}

/** The student may still write: not handed in, the assignment open and not past its closing. */
async function isWorking(db: Db, readingId: string, now: Date): Promise<boolean> {
  const [row] = await db
    .select({ closesAt: assignments.closesAt })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .where(
      and(
        eq(submissions.readingId, readingId),
        eq(submissions.state, 'working'),
        eq(assignments.state, 'open'),
        isNull(assignments.deletedAt),
      ),
    );
  return row !== undefined && (row.closesAt === null || row.closesAt > now);
}

/** What a submission may change: the frame its assignment gives. Null for a reading that is no submission. */
export interface AnswerFrame {
  readonly segmentation: Segmentation;
  readonly keysGiven: boolean;
  /** Starts of the asked spans; all spans when empty. */
  readonly askedStarts: readonly number[];
}

export async function findAnswerFrame(db: Db, readingId: string): Promise<AnswerFrame | null> {
  const [row] = await db
    .select({ id: assignments.id, segmentation: assignments.segmentation, keysGiven: assignments.keysGiven })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .where(eq(submissions.readingId, readingId));
  if (!row) return null;
  const asked = await db.select({ start: questions.startTick }).from(questions).where(eq(questions.assignmentId, row.id)).orderBy(asc(questions.startTick));
  return { segmentation: row.segmentation, keysGiven: row.keysGiven, askedStarts: asked.map((q) => q.start) };
}
