import { and, asc, count, desc, eq, inArray, isNull } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { excerpts, scores, users } from '@/db/schema';
import type { Refusal, ScoreBar, ScoreRemark } from '@/db/schema/scores';
import type { Actor } from '@/lib/auth/actor';
import type { ScoreState } from '@/lib/vocabularies';

const SCORE_COLUMNS = {
  id: scores.id,
  title: scores.title,
  composer: scores.composer,
  work: scores.work,
  source: scores.source,
  rights: scores.rights,
  fileName: scores.fileName,
  sha256: scores.sha256,
  byteSize: scores.byteSize,
  state: scores.state,
  refusal: scores.refusal,
  ticksPerQuarter: scores.ticksPerQuarter,
  bars: scores.bars,
  noteCount: scores.noteCount,
  keyFifths: scores.keyFifths,
  warnings: scores.warnings,
  uploadedBy: scores.uploadedBy,
  uploaderName: users.name,
  createdAt: scores.createdAt,
} as const;

/** A score of the actor's department that is not deleted. */
function inReach(actor: Actor) {
  return and(eq(scores.departmentId, actor.departmentId), isNull(scores.deletedAt));
}

export async function findScore(db: Db, actor: Actor, scoreId: string) {
  const [row] = await db
    .select(SCORE_COLUMNS)
    .from(scores)
    .innerJoin(users, eq(users.id, scores.uploadedBy))
    .where(and(eq(scores.id, scoreId), inReach(actor)));
  return row ?? null;
}
export type ScoreRow = NonNullable<Awaited<ReturnType<typeof findScore>>>;

/** The score of the department that holds the same file, if there is one. */
export async function findScoreOfFile(db: Db, actor: Actor, sha256: string) {
  const [row] = await db
    .select({ id: scores.id, title: scores.title, state: scores.state })
    .from(scores)
    .where(and(inReach(actor), eq(scores.sha256, sha256)))
    .orderBy(asc(scores.createdAt))
    .limit(1);
  return row ?? null;
}

export interface ScoreProgress {
  readonly id: string;
  readonly title: string;
  readonly composer: string;
  readonly state: ScoreState;
  readonly refusal: Refusal | null;
}

/** Where the reading of these scores stands; ids out of reach are left out. */
export async function findScoreStates(db: Db, actor: Actor, scoreIds: readonly string[]): Promise<ScoreProgress[]> {
  if (scoreIds.length === 0) return [];
  return db
    .select({ id: scores.id, title: scores.title, composer: scores.composer, state: scores.state, refusal: scores.refusal })
    .from(scores)
    .where(and(inReach(actor), inArray(scores.id, [...scoreIds])));
}

export interface NewScore {
  readonly id: string;
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly source: string;
  readonly rights: string;
  readonly fileName: string;
  readonly sha256: string;
  readonly byteSize: number;
}

export async function insertScore(db: Db, actor: Actor, score: NewScore): Promise<void> {
  await db.insert(scores).values({ ...score, departmentId: actor.departmentId, uploadedBy: actor.userId });
}

export interface ScoreFacts {
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly source: string;
  readonly rights: string;
}

export async function updateScoreFacts(db: Db, actor: Actor, scoreId: string, facts: ScoreFacts): Promise<void> {
  await db.update(scores).set(facts).where(and(eq(scores.id, scoreId), inReach(actor)));
}

export async function setScoreDeleted(db: Db, actor: Actor, scoreId: string, deletedAt: Date | null): Promise<void> {
  await db
    .update(scores)
    .set({ deletedAt })
    .where(and(eq(scores.id, scoreId), eq(scores.departmentId, actor.departmentId)));
}

/** A score that the actor deleted or may bring back; for undo only. */
export async function findDeletedScore(db: Db, actor: Actor, scoreId: string) {
  const [row] = await db
    .select({ id: scores.id, uploadedBy: scores.uploadedBy, sha256: scores.sha256, deletedAt: scores.deletedAt })
    .from(scores)
    .where(and(eq(scores.id, scoreId), eq(scores.departmentId, actor.departmentId)));
  return row?.deletedAt ? row : null;
}

export async function countExcerpts(db: Db, actor: Actor, scoreId: string): Promise<number> {
  const [row] = await db
    .select({ n: count() })
    .from(excerpts)
    .where(and(eq(excerpts.scoreId, scoreId), eq(excerpts.departmentId, actor.departmentId), isNull(excerpts.deletedAt)));
  return row?.n ?? 0;
}

/** What the actor wrote last as source and rights: the next upload starts from it. */
export async function findLastStatements(db: Db, actor: Actor) {
  const [row] = await db
    .select({ source: scores.source, rights: scores.rights })
    .from(scores)
    .where(and(eq(scores.departmentId, actor.departmentId), eq(scores.uploadedBy, actor.userId)))
    .orderBy(desc(scores.createdAt))
    .limit(1);
  return row ?? null;
}

/** For the job that reads a score: there is no actor; the job was queued by one who could upload it. */
export async function unsafeFindScoreFile(db: Db, scoreId: string) {
  const [row] = await db
    .select({
      id: scores.id,
      departmentId: scores.departmentId,
      sha256: scores.sha256,
      state: scores.state,
      fileName: scores.fileName,
      title: scores.title,
      composer: scores.composer,
      work: scores.work,
    })
    .from(scores)
    .where(and(eq(scores.id, scoreId), isNull(scores.deletedAt)));
  return row ?? null;
}

/** What reading a file gave. `title`, `composer` and `work` are written only where the uploader left them empty. */
export interface ReadScoreFacts {
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly ticksPerQuarter: number;
  readonly bars: readonly ScoreBar[];
  readonly noteCount: number;
  readonly keyFifths: number | null;
  readonly warnings: readonly ScoreRemark[];
}

export async function unsafeSetScoreState(db: Db, scoreId: string, state: ScoreState): Promise<void> {
  await db.update(scores).set({ state }).where(eq(scores.id, scoreId));
}

export async function unsafeSaveReadScore(db: Db, scoreId: string, facts: ReadScoreFacts): Promise<void> {
  await db.update(scores).set({ ...facts, state: 'ready', refusal: null }).where(eq(scores.id, scoreId));
}

export async function unsafeSaveRefusal(db: Db, scoreId: string, refusal: Refusal): Promise<void> {
  await db.update(scores).set({ state: 'refused', refusal }).where(eq(scores.id, scoreId));
}
