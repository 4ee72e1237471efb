import { type SQL, and, asc, eq, getTableColumns, gt, inArray } from 'drizzle-orm';
import type { MySqlColumn, MySqlTable } from 'drizzle-orm/mysql-core';
import type { Db } from '@/db/client';
import {
  assignments,
  auditEvents,
  courseMembers,
  courses,
  departmentMembers,
  excerpts,
  handoutPrints,
  invitations,
  keyRegions,
  labelAlternatives,
  labels,
  marks,
  questions,
  readings,
  remarks,
  revisions,
  scores,
  submissions,
  users,
} from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';

/** A row of an export: its columns by name. */
export interface DataRow {
  readonly id: string;
}

/** One kind of row of a department, read a page at a time in the order of ids. */
export interface DataSet {
  readonly name: string;
  /** The rows whose id comes after `after`, `PAGE` at most; a short page is the last. */
  page(after: string): Promise<readonly DataRow[]>;
}

export const PAGE = 200;

type TableWithId = MySqlTable & { readonly id: MySqlColumn };

/** A table without secrets, with every column. */
function wholeTable(db: Db, name: string, table: TableWithId, scope: SQL | undefined): DataSet {
  return {
    name,
    page: async (after) => {
      const rows = await db
        .select(getTableColumns(table))
        .from(table)
        .where(and(scope, gt(table.id, after)))
        .orderBy(asc(table.id))
        .limit(PAGE);
      return rows as unknown as DataRow[];
    },
  };
}

/** All that belongs to the actor's department. Files of scores are not rows; see listScoreFiles. */
export function departmentDataSets(db: Db, { departmentId }: Actor): readonly DataSet[] {
  const inReadings = db.select({ id: readings.id }).from(readings).where(eq(readings.departmentId, departmentId));
  const inCourses = db.select({ id: courses.id }).from(courses).where(eq(courses.departmentId, departmentId));
  const inAssignments = db.select({ id: assignments.id }).from(assignments).where(inArray(assignments.courseId, inCourses));
  const inSubmissions = db
    .select({ id: submissions.id })
    .from(submissions)
    .where(inArray(submissions.assignmentId, inAssignments));
  return [
    members(db, departmentId),
    invited(db, departmentId),
    withMembers(db, wholeTable(db, 'courses', courses, eq(courses.departmentId, departmentId))),
    wholeTable(db, 'scores', scores, eq(scores.departmentId, departmentId)),
    wholeTable(db, 'excerpts', excerpts, eq(excerpts.departmentId, departmentId)),
    withSpans(db, wholeTable(db, 'readings', readings, eq(readings.departmentId, departmentId))),
    wholeTable(db, 'remarks', remarks, inArray(remarks.readingId, inReadings)),
    wholeTable(db, 'revisions', revisions, inArray(revisions.readingId, inReadings)),
    wholeTable(db, 'handout-prints', handoutPrints, eq(handoutPrints.departmentId, departmentId)),
    wholeTable(db, 'assignments', assignments, inArray(assignments.courseId, inCourses)),
    wholeTable(db, 'questions', questions, inArray(questions.assignmentId, inAssignments)),
    wholeTable(db, 'submissions', submissions, inArray(submissions.assignmentId, inAssignments)),
    wholeTable(db, 'marks', marks, inArray(marks.submissionId, inSubmissions)),
    wholeTable(db, 'audit-events', auditEvents, eq(auditEvents.departmentId, departmentId)),
  ];
}

/** Users have secrets: their columns are listed. */
function members(db: Db, departmentId: string): DataSet {
  const columns = { id: users.id, name: users.name, email: users.email, role: departmentMembers.role, since: departmentMembers.createdAt };
  return {
    name: 'members',
    page: (after) =>
      db
        .select(columns)
        .from(departmentMembers)
        .innerJoin(users, eq(users.id, departmentMembers.userId))
        .where(and(eq(departmentMembers.departmentId, departmentId), gt(users.id, after)))
        .orderBy(asc(users.id))
        .limit(PAGE),
  };
}

function invited(db: Db, departmentId: string): DataSet {
  const { tokenHash: _secret, ...columns } = getTableColumns(invitations);
  return {
    name: 'invitations',
    page: (after) =>
      db
        .select(columns)
        .from(invitations)
        .where(and(eq(invitations.departmentId, departmentId), gt(invitations.id, after)))
        .orderBy(asc(invitations.id))
        .limit(PAGE),
  };
}

function withMembers(db: Db, set: DataSet): DataSet {
  return {
    name: set.name,
    page: async (after) => {
      const rows = await set.page(after);
      const found = await rowsOf(rows, (ids) => db.select().from(courseMembers).where(inArray(courseMembers.courseId, ids)));
      return rows.map((row) => ({ ...row, members: found.filter((member) => member.courseId === row.id) }));
    },
  };
}

/** Each reading with its key regions and its labels, and each label with the other readings of its span. */
function withSpans(db: Db, set: DataSet): DataSet {
  return {
    name: set.name,
    page: async (after) => {
      const rows = await set.page(after);
      const regions = await rowsOf(rows, (ids) => db.select().from(keyRegions).where(inArray(keyRegions.readingId, ids)));
      const spans = await rowsOf(rows, (ids) =>
        db.select().from(labels).where(inArray(labels.readingId, ids)).orderBy(asc(labels.position)),
      );
      const others = await rowsOf(spans, (ids) =>
        db.select().from(labelAlternatives).where(inArray(labelAlternatives.labelId, ids)).orderBy(asc(labelAlternatives.rank)),
      );
      const othersByLabel = groupBy(others, ({ labelId }) => labelId);
      const labelsByReading = groupBy(
        spans.map((label) => ({ ...label, others: othersByLabel.get(label.id) ?? [] })),
        ({ readingId }) => readingId,
      );
      const regionsByReading = groupBy(regions, ({ readingId }) => readingId);
      return rows.map((row) => ({
        ...row,
        regions: regionsByReading.get(row.id) ?? [],
        labels: labelsByReading.get(row.id) ?? [],
      }));
    },
  };
}

function groupBy<T>(rows: readonly T[], keyOf: (row: T) => string): ReadonlyMap<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(keyOf(row));
    if (group) group.push(row);
    else groups.set(keyOf(row), [row]);
  }
  return groups;
}

/** Rows that belong to those; none for none (an empty IN list is no SQL). */
async function rowsOf<T>(rows: readonly DataRow[], query: (ids: string[]) => PromiseLike<T[]>): Promise<T[]> {
  return rows.length === 0 ? [] : query(rows.map(({ id }) => id));
}

export interface ScoreFile {
  readonly sha256: string;
  readonly fileName: string;
}

/** The files of the department's scores, each once. */
export async function listScoreFiles(db: Db, actor: Actor): Promise<ScoreFile[]> {
  const rows = await db
    .select({ sha256: scores.sha256, fileName: scores.fileName })
    .from(scores)
    .where(eq(scores.departmentId, actor.departmentId));
  return [...new Map(rows.map((row) => [row.sha256, row])).values()];
}
