import { and, asc, count, eq, inArray, isNull, ne, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { assignments, excerpts, keyRegions, labels, readings, scores, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';

/** An excerpt of the actor's department that is not deleted, nor its score. */
function inReach(actor: Actor) {
  return and(eq(excerpts.departmentId, actor.departmentId), isNull(excerpts.deletedAt), isNull(scores.deletedAt));
}

/** The number printed at a bar, without loading all bars of the score. */
function printedNumber(bar: typeof excerpts.firstBar | typeof excerpts.lastBar) {
  return sql<string>`coalesce(json_value(${scores.bars}, concat('$[', ${bar}, '].number')), '')`;
}

export async function findExcerpt(db: Db, actor: Actor, excerptId: string) {
  const [row] = await db
    .select({
      id: excerpts.id,
      title: excerpts.title,
      purpose: excerpts.purpose,
      firstBar: excerpts.firstBar,
      lastBar: excerpts.lastBar,
      startTick: excerpts.startTick,
      endTick: excerpts.endTick,
      createdBy: excerpts.createdBy,
      creatorName: users.name,
      createdAt: excerpts.createdAt,
      scoreId: scores.id,
      scoreTitle: scores.title,
      composer: scores.composer,
      bars: scores.bars,
      ticksPerQuarter: scores.ticksPerQuarter,
      sha256: scores.sha256,
    })
    .from(excerpts)
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .innerJoin(users, eq(users.id, excerpts.createdBy))
    .where(and(eq(excerpts.id, excerptId), inReach(actor)));
  return row ?? null;
}
export type ExcerptRow = NonNullable<Awaited<ReturnType<typeof findExcerpt>>>;

export async function listExcerptsOfScores(db: Db, actor: Actor, scoreIds: readonly string[]) {
  if (scoreIds.length === 0) return [];
  return db
    .select({
      id: excerpts.id,
      scoreId: excerpts.scoreId,
      title: excerpts.title,
      purpose: excerpts.purpose,
      firstBar: excerpts.firstBar,
      lastBar: excerpts.lastBar,
      firstNumber: printedNumber(excerpts.firstBar),
      lastNumber: printedNumber(excerpts.lastBar),
      createdBy: excerpts.createdBy,
      creatorName: users.name,
      createdAt: excerpts.createdAt,
    })
    .from(excerpts)
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .innerJoin(users, eq(users.id, excerpts.createdBy))
    .where(and(inArray(excerpts.scoreId, [...scoreIds]), inReach(actor)))
    .orderBy(asc(excerpts.firstBar), asc(excerpts.lastBar), asc(excerpts.createdAt));
}
export type ExcerptListRow = Awaited<ReturnType<typeof listExcerptsOfScores>>[number];

export interface NewExcerpt {
  readonly id: string;
  readonly scoreId: string;
  readonly title: string;
  readonly purpose: string;
  /** Indexes into the score's bars, both ends included. */
  readonly firstBar: number;
  readonly lastBar: number;
  readonly startTick: number;
  readonly endTick: number;
}

export async function insertExcerpt(db: Db, actor: Actor, excerpt: NewExcerpt): Promise<void> {
  await db.insert(excerpts).values({ ...excerpt, departmentId: actor.departmentId, createdBy: actor.userId });
}

export async function updateExcerptWords(db: Db, actor: Actor, excerptId: string, words: { title: string; purpose: string }): Promise<void> {
  await db
    .update(excerpts)
    .set(words)
    .where(and(eq(excerpts.id, excerptId), eq(excerpts.departmentId, actor.departmentId)));
}

export async function setExcerptDeleted(db: Db, actor: Actor, excerptId: string, deletedAt: Date | null): Promise<void> {
  await db
    .update(excerpts)
    .set({ deletedAt })
    .where(and(eq(excerpts.id, excerptId), eq(excerpts.departmentId, actor.departmentId)));
}

export async function findDeletedExcerpt(db: Db, actor: Actor, excerptId: string) {
  const [row] = await db
    .select({ id: excerpts.id, createdBy: excerpts.createdBy, scoreId: excerpts.scoreId, deletedAt: excerpts.deletedAt })
    .from(excerpts)
    .innerJoin(scores, eq(scores.id, excerpts.scoreId))
    .where(and(eq(excerpts.id, excerptId), eq(excerpts.departmentId, actor.departmentId), isNull(scores.deletedAt)));
  return row?.deletedAt ? row : null;
}

/** Assignments that hand the excerpt to students; while there are any it stays. */
export async function countAssignmentsOfExcerpt(db: Db, actor: Actor, excerptId: string): Promise<number> {
  const [row] = await db
    .select({ n: count() })
    .from(assignments)
    .innerJoin(excerpts, eq(excerpts.id, assignments.excerptId))
    .where(and(eq(excerpts.id, excerptId), eq(excerpts.departmentId, actor.departmentId), isNull(assignments.deletedAt)));
  return row?.n ?? 0;
}

/**
 * Readings of library work that the actor may see: the engine's, their own, and what colleagues share. Keys and
 * submissions have pages of their own; a key is listed for its owner, or for whoever runs courses.
 */
function visibleReading(actor: Actor) {
  const runsCourses = actor.role === 'owner' || actor.role === 'instructor';
  return and(
    eq(readings.departmentId, actor.departmentId),
    isNull(readings.deletedAt),
    ne(readings.kind, 'submission'),
    or(
      eq(readings.kind, 'engine'),
      eq(readings.ownerId, actor.userId),
      and(eq(readings.kind, 'person'), ne(readings.shared, 'private')),
      runsCourses ? eq(readings.kind, 'key') : undefined,
    ),
  );
}

/** The readings of some excerpts with how far each is: `settled` of `labels` are accepted or changed. */
export async function listReadingsOfExcerpts(db: Db, actor: Actor, excerptIds: readonly string[]) {
  if (excerptIds.length === 0) return [];
  return db
    .select({
      id: readings.id,
      excerptId: readings.excerptId,
      kind: readings.kind,
      title: readings.title,
      state: readings.state,
      shared: readings.shared,
      ownerId: readings.ownerId,
      ownerName: users.name,
      updatedAt: readings.updatedAt,
      labelCount: sql<number>`count(${labels.id})`.mapWith(Number),
      settledCount: sql<number>`count(case when ${labels.state} in ('accepted', 'changed') then 1 end)`.mapWith(Number),
      diminishedCount: sql<number>`count(case when ${labels.appliedStep} is not null and ${labels.quality} in ('diminished-seventh', 'half-diminished-seventh') then 1 end)`.mapWith(Number),
    })
    .from(readings)
    .leftJoin(users, eq(users.id, readings.ownerId))
    .leftJoin(labels, eq(labels.readingId, readings.id))
    .where(and(inArray(readings.excerptId, [...excerptIds]), visibleReading(actor)))
    .groupBy(readings.id, users.name)
    .orderBy(asc(readings.createdAt));
}
export type ReadingListRow = Awaited<ReturnType<typeof listReadingsOfExcerpts>>[number];

/** The key each excerpt begins in, as the engine (or else the first reading) hears it. */
export async function listOpeningKeys(db: Db, actor: Actor, excerptIds: readonly string[]) {
  if (excerptIds.length === 0) return [];
  return db
    .select({ excerptId: readings.excerptId, tonicFifths: keyRegions.tonicFifths, mode: keyRegions.mode })
    .from(readings)
    .innerJoin(keyRegions, and(eq(keyRegions.readingId, readings.id), eq(keyRegions.startTick, readings.startTick)))
    .where(and(inArray(readings.excerptId, [...excerptIds]), visibleReading(actor)))
    .orderBy(sql`${readings.kind} = 'engine' desc`, asc(readings.createdAt));
}
