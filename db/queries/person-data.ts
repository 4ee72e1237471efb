import { and, asc, eq, inArray, isNull, or } from 'drizzle-orm';
import type { Db } from '@/db/client';
import {
  accounts,
  assignments,
  auditEvents,
  courseMembers,
  courses,
  departmentMembers,
  departments,
  excerpts,
  handoutPrints,
  keyRegions,
  labels,
  marks,
  readings,
  remarks,
  scores,
  submissions,
  users,
} from '@/db/schema';

/** A person's data: everywhere, or within one department (for its owner). */
export interface PersonScope {
  readonly userId: string;
  readonly departmentId: string | null;
}

export async function getPersonAccount(db: Db, { userId }: PersonScope) {
  const [account] = await db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      emailVerifiedAt: users.emailVerifiedAt,
      preferences: users.preferences,
      createdAt: users.createdAt,
    })
    .from(users)
    .where(eq(users.id, userId));
  const identities = await db
    .select({ provider: accounts.provider, since: accounts.createdAt })
    .from(accounts)
    .where(eq(accounts.userId, userId));
  return { ...account, identities };
}

export async function listPersonMemberships(db: Db, { userId, departmentId }: PersonScope) {
  const inDepartments = await db
    .select({ department: departments.name, role: departmentMembers.role, since: departmentMembers.createdAt })
    .from(departmentMembers)
    .innerJoin(departments, eq(departments.id, departmentMembers.departmentId))
    .where(and(eq(departmentMembers.userId, userId), departmentId ? eq(departments.id, departmentId) : undefined));
  const inCourses = await db
    .select({ course: courses.title, code: courses.code, term: courses.term, role: courseMembers.role, since: courseMembers.createdAt })
    .from(courseMembers)
    .innerJoin(courses, eq(courses.id, courseMembers.courseId))
    .where(and(eq(courseMembers.userId, userId), departmentId ? eq(courses.departmentId, departmentId) : undefined));
  return { departments: inDepartments, courses: inCourses };
}

export async function listPersonScores(db: Db, { userId, departmentId }: PersonScope) {
  return db
    .select({ id: scores.id, title: scores.title, composer: scores.composer, fileName: scores.fileName, createdAt: scores.createdAt })
    .from(scores)
    .where(and(eq(scores.uploadedBy, userId), departmentId ? eq(scores.departmentId, departmentId) : undefined));
}

export async function listPersonHandouts(db: Db, { userId, departmentId }: PersonScope) {
  return db
    .select({ id: handoutPrints.id, options: handoutPrints.options, createdAt: handoutPrints.createdAt })
    .from(handoutPrints)
    .where(and(eq(handoutPrints.requestedBy, userId), departmentId ? eq(handoutPrints.departmentId, departmentId) : undefined));
}

/** The readings the person owns, submissions among them, each with its key regions and labels. */
export async function listPersonReadings(db: Db, { userId, departmentId }: PersonScope) {
  const owned = await db
    .select({
      id: readings.id,
      title: readings.title,
      kind: readings.kind,
      shared: readings.shared,
      excerpt: excerpts.title,
      version: readings.version,
      createdAt: readings.createdAt,
      updatedAt: readings.updatedAt,
    })
    .from(readings)
    .innerJoin(excerpts, eq(excerpts.id, readings.excerptId))
    .where(and(eq(readings.ownerId, userId), departmentId ? eq(readings.departmentId, departmentId) : undefined))
    .orderBy(asc(readings.createdAt), asc(readings.id));
  const spans = await listSpans(db, owned.map(({ id }) => id));
  return owned.map((reading) => ({ ...reading, ...spans(reading.id) }));
}

async function listSpans(db: Db, readingIds: readonly string[]) {
  if (readingIds.length === 0) return () => ({ regions: [], labels: [] });
  const regions = await db
    .select({
      readingId: keyRegions.readingId,
      start: keyRegions.startTick,
      end: keyRegions.endTick,
      tonicFifths: keyRegions.tonicFifths,
      mode: keyRegions.mode,
    })
    .from(keyRegions)
    .where(inArray(keyRegions.readingId, readingIds))
    .orderBy(asc(keyRegions.startTick));
  const spans = await db
    .select({
      readingId: labels.readingId,
      start: labels.startTick,
      end: labels.endTick,
      numeral: labels.numeralText,
      state: labels.state,
    })
    .from(labels)
    .where(inArray(labels.readingId, readingIds))
    .orderBy(asc(labels.position));
  return (readingId: string) => ({
    regions: regions.filter((region) => region.readingId === readingId),
    labels: spans.filter((label) => label.readingId === readingId),
  });
}

export async function listPersonRemarks(db: Db, { userId, departmentId }: PersonScope) {
  return db
    .select({ reading: readings.title, body: remarks.body, createdAt: remarks.createdAt })
    .from(remarks)
    .innerJoin(readings, eq(readings.id, remarks.readingId))
    .where(
      and(
        eq(remarks.authorId, userId),
        isNull(remarks.deletedAt),
        departmentId ? eq(readings.departmentId, departmentId) : undefined,
      ),
    )
    .orderBy(asc(remarks.createdAt));
}

/** Marks only of what was released: before that they are the teacher's draft. */
export async function listPersonSubmissions(db: Db, { userId, departmentId }: PersonScope) {
  const handed = await db
    .select({
      id: submissions.id,
      course: courses.title,
      assignment: assignments.title,
      attempt: submissions.attempt,
      state: submissions.state,
      readingId: submissions.readingId,
      handedInAt: submissions.handedInAt,
      releasedAt: submissions.releasedAt,
      points: submissions.points,
      maxPoints: submissions.maxPoints,
    })
    .from(submissions)
    .innerJoin(assignments, eq(assignments.id, submissions.assignmentId))
    .innerJoin(courses, eq(courses.id, assignments.courseId))
    .where(and(eq(submissions.studentId, userId), departmentId ? eq(courses.departmentId, departmentId) : undefined))
    .orderBy(asc(submissions.createdAt));
  const given = await listReleasedMarks(db, userId);
  return handed.map((submission) => ({
    ...submission,
    ...(submission.state === 'released' ? {} : { points: null, maxPoints: null }),
    marks: given.filter((mark) => mark.submissionId === submission.id),
  }));
}

async function listReleasedMarks(db: Db, userId: string) {
  return db
    .select({
      submissionId: marks.submissionId,
      start: marks.startTick,
      end: marks.endTick,
      verdict: marks.verdict,
      points: marks.points,
      maxPoints: marks.maxPoints,
      overrideVerdict: marks.overrideVerdict,
      overridePoints: marks.overridePoints,
      remark: marks.remark,
      reasons: marks.reasons,
    })
    .from(marks)
    .innerJoin(submissions, eq(submissions.id, marks.submissionId))
    .where(and(eq(submissions.studentId, userId), eq(submissions.state, 'released')))
    .orderBy(asc(marks.startTick));
}

export async function listPersonAudit(db: Db, { userId, departmentId }: PersonScope) {
  return db
    .select({ verb: auditEvents.verb, subjectKind: auditEvents.subjectKind, subjectId: auditEvents.subjectId, createdAt: auditEvents.createdAt })
    .from(auditEvents)
    .where(
      and(
        or(eq(auditEvents.actorId, userId), eq(auditEvents.subjectId, userId)),
        departmentId ? eq(auditEvents.departmentId, departmentId) : undefined,
      ),
    )
    .orderBy(asc(auditEvents.createdAt));
}
