import { and, asc, desc, eq, inArray, isNull, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, courseMembers, courses, excerpts, questions, readings, scores, submissions, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { Framed } from '@/lib/marking/key-reading';
import type { Rubric } from '@/lib/marking/rubric';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { AssignmentState, CourseRole, ReadingKind, ReadingState, Segmentation } from '@/lib/vocabularies';
import { courseInReach, ownMembership } from './courses';

/** An assignment with what one always needs to know beside it. Without its key: that has its own query. */
export interface Assignment {
  readonly id: string;
  readonly courseId: string;
  readonly courseTitle: string;
  readonly courseRole: CourseRole | null;
  readonly conventions: ConventionSheet | null;
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly scoreId: string;
  readonly scoreTitle: string;
  readonly composer: string;
  readonly ticksPerQuarter: number;
  readonly bars: readonly { readonly index: number; readonly number: string; readonly start: number; readonly length: number }[];
  readonly title: string;
  readonly instructions: string;
  readonly segmentation: Segmentation;
  readonly keysGiven: boolean;
  readonly othersGiven: boolean;
  readonly rubric: Rubric;
  readonly opensAt: Date | null;
  readonly dueAt: Date | null;
  readonly closesAt: Date | null;
  readonly attempts: number;
  readonly state: AssignmentState;
  readonly showKeyAfterRelease: boolean;
}

const ASSIGNMENT_COLUMNS = {
  id: assignments.id,
  courseId: assignments.courseId,
  courseTitle: courses.title,
  courseRole: courseMembers.role,
  conventions: courses.conventions,
  excerptId: excerpts.id,
  excerptTitle: excerpts.title,
  scoreId: scores.id,
  scoreTitle: scores.title,
  composer: scores.composer,
  ticksPerQuarter: scores.ticksPerQuarter,
  bars: scores.bars,
  title: assignments.title,
  instructions: assignments.instructions,
  segmentation: assignments.segmentation,
  keysGiven: assignments.keysGiven,
  othersGiven: assignments.othersGiven,
  pointsPerLabel: assignments.pointsPerLabel,
  rubric: assignments.rubric,
  opensAt: assignments.opensAt,
  dueAt: assignments.dueAt,
  closesAt: assignments.closesAt,
  attempts: assignments.attempts,
  state: assignments.state,
  showKeyAfterRelease: assignments.showKeyAfterRelease,
};

function selectAssignments(db: Db, actor: Actor) {
  return db
    .select(ASSIGNMENT_COLUMNS)
    .from(assignments)
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .innerJoin(excerpts, eq(excerpts.id, assignments.excerptId))
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .leftJoin(courseMembers, ownMembership(actor));
}

type AssignmentRow = Awaited<ReturnType<typeof selectAssignments>>[number];

/** The columns hold what the schema of the rubric and of the sheet let in; points per label have their own column. */
function assignmentOf({ rubric, pointsPerLabel, conventions, ticksPerQuarter, bars, ...rest }: AssignmentRow): Assignment {
  return {
    ...rest,
    rubric: { ...(rubric as Rubric), pointsPerLabel },
    conventions: conventions as ConventionSheet | null,
    ticksPerQuarter: ticksPerQuarter ?? 1,
    bars: bars ?? [],
  };
}

/** A student meets an assignment once it is no draft. */
function visibleTo(actor: Actor) {
  const taught = inArray(courseMembers.role, ['instructor', 'assistant']);
  const mayPrepare = actor.role === 'owner' ? undefined : or(taught, inArray(assignments.state, ['open', 'closed']));
  return and(isNull(assignments.deletedAt), courseInReach(actor), mayPrepare);
}

export async function findAssignment(db: Db, actor: Actor, assignmentId: string): Promise<Assignment | null> {
  const [row] = await selectAssignments(db, actor).where(and(eq(assignments.id, assignmentId), visibleTo(actor)));
  return row ? assignmentOf(row) : null;
}

export interface ListedAssignment extends Assignment {
  readonly students: number;
  /** Students with something handed in. */
  readonly handedIn: number;
  readonly released: number;
}

/** A course's assignments, by when they are due. */
export async function listAssignments(db: Db, actor: Actor, courseId: string): Promise<ListedAssignment[]> {
  const rows = await selectAssignments(db, actor)
    .where(and(eq(assignments.courseId, courseId), visibleTo(actor)))
    .orderBy(sql`${assignments.dueAt} is null`, asc(assignments.dueAt), asc(assignments.createdAt));
  const counts = await countSubmissions(db, rows.map((row) => row.id));
  return rows.map((row) => ({ ...assignmentOf(row), ...(counts.get(row.id) ?? NO_COUNTS) }));
}

interface Counts {
  readonly students: number;
  readonly handedIn: number;
  readonly released: number;
}

const NO_COUNTS: Counts = { students: 0, handedIn: 0, released: 0 };

async function countSubmissions(db: Db, ids: readonly string[]): Promise<ReadonlyMap<string, Counts>> {
  if (ids.length === 0) return new Map();
  // Columns are named in full: in a query of one table drizzle leaves the table out, and the subqueries have their own.
  const rows = await db
    .select({
      id: assignments.id,
      students: sql<number>`(select count(*) from course_members m where m.course_id = assignments.course_id and m.role = 'student')`,
      handedIn: sql<number>`(select count(distinct b.student_id) from submissions b where b.assignment_id = assignments.id and b.state <> 'working')`,
      released: sql<number>`(select count(distinct b.student_id) from submissions b where b.assignment_id = assignments.id and b.state = 'released')`,
    })
    .from(assignments)
    .where(inArray(assignments.id, [...ids]));
  return new Map(rows.map((row) => [row.id, { students: Number(row.students), handedIn: Number(row.handedIn), released: Number(row.released) }]));
}

export interface Question {
  readonly startTick: number;
  readonly points: number | null;
  readonly alternatives: readonly Framed[];
}

/** What is asked; whoever calls it has found the assignment. Alternatives are part of the key: not for students. */
export async function unsafeListQuestions(db: Db, assignmentId: string): Promise<Question[]> {
  return db
    .select({ startTick: questions.startTick, points: questions.points, alternatives: questions.alternatives })
    .from(questions)
    .where(eq(questions.assignmentId, assignmentId))
    .orderBy(asc(questions.startTick));
}

/** What assignments accept beside the labels of a key, by the labels' starts. Whoever calls it has found the key as someone who may see it. */
export async function unsafeListAccepted(db: Db, keyReadingId: string): Promise<Pick<Question, 'startTick' | 'alternatives'>[]> {
  return db
    .select({ startTick: questions.startTick, alternatives: questions.alternatives })
    .from(questions)
    .innerJoin(assignments, eq(assignments.id, questions.assignmentId))
    .where(and(eq(assignments.keyReadingId, keyReadingId), isNull(assignments.deletedAt)))
    .orderBy(asc(questions.startTick));
}

/** The reading that marks are given against, for those who prepare and mark. */
export interface KeyRow {
  readonly id: string;
  readonly title: string;
  readonly kind: ReadingKind;
  readonly startTick: number;
  readonly endTick: number;
  readonly version: number;
}

export async function unsafeGetKeyRow(db: Db, assignmentId: string): Promise<KeyRow> {
  const [row] = await db
    .select({
      id: readings.id,
      title: readings.title,
      kind: readings.kind,
      startTick: readings.startTick,
      endTick: readings.endTick,
      version: readings.version,
    })
    .from(assignments)
    .innerJoin(readings, eq(readings.id, assignments.keyReadingId))
    .where(eq(assignments.id, assignmentId));
  if (!row) throw new Error('an assignment has a key');
  return row;
}

export interface KeySource {
  readonly readingId: string;
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly scoreTitle: string;
  readonly composer: string;
  readonly title: string;
  readonly kind: ReadingKind;
  readonly state: ReadingState;
  readonly ownerName: string | null;
  readonly updatedAt: Date;
}

/** Readings that a key can be taken from: keys, the actor's own, shared ones and the engine's, of the department. */
export async function listKeySources(db: Db, actor: Actor): Promise<KeySource[]> {
  const mine = eq(readings.ownerId, actor.userId);
  const forColleagues = and(eq(readings.kind, 'person'), inArray(readings.shared, ['comment', 'edit']));
  return db
    .select({
      readingId: readings.id,
      excerptId: excerpts.id,
      excerptTitle: excerpts.title,
      scoreTitle: scores.title,
      composer: scores.composer,
      title: readings.title,
      kind: readings.kind,
      state: readings.state,
      ownerName: users.name,
      updatedAt: readings.updatedAt,
    })
    .from(readings)
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .leftJoin(users, eq(users.id, readings.ownerId))
    .where(
      and(
        eq(readings.departmentId, actor.departmentId),
        isNull(readings.deletedAt),
        isNull(excerpts.deletedAt),
        inArray(readings.state, ['open', 'settled']),
        or(inArray(readings.kind, ['key', 'engine']), and(eq(readings.kind, 'person'), mine), forColleagues),
      ),
    )
    .orderBy(asc(scores.composer), asc(scores.title), asc(excerpts.title), desc(readings.updatedAt));
}

/** Someone has begun it. */
export async function hasSubmissions(db: Db, assignmentId: string): Promise<boolean> {
  const [row] = await db.select({ id: submissions.id }).from(submissions).where(eq(submissions.assignmentId, assignmentId)).limit(1);
  return row !== undefined;
}

/** Sharps (positive) or flats of the score's first key signature; 0 when it has none. */
export async function unsafeGetKeySignature(db: Db, scoreId: string): Promise<number> {
  const [row] = await db.select({ keyFifths: scores.keyFifths }).from(scores).where(eq(scores.id, scoreId));
  return row?.keyFifths ?? 0;
}

/** An excerpt's bars as places in its score, both ends included; the caller may see the excerpt. */
export async function findExcerptBars(db: Db, excerptId: string): Promise<{ readonly firstBar: number; readonly lastBar: number }> {
  const [row] = await db.select({ firstBar: excerpts.firstBar, lastBar: excerpts.lastBar }).from(excerpts).where(eq(excerpts.id, excerptId));
  if (!row) throw new Error('an assignment has an excerpt');
  return row;
}
