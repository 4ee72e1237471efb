import { and, asc, desc, eq, gt, inArray, isNull, lt, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { keyRegions, labelAlternatives, labels, readings, remarks, revisions, users } from '@/db/schema';
import type { StoredLabel, StoredRegion } from './reading-rows';
import { alternativeRow, labelRow } from './reading-rows';

/** The two sides of a change as a revision keeps them, and in words what it was. */
export interface StoredSide {
  readonly labels: readonly StoredLabel[];
  readonly regions: readonly StoredRegion[];
  readonly words?: string;
  /** Remarks that hung on labels the change took away: they hang there again when it is undone. */
  readonly remarks?: readonly { readonly id: string; readonly labelId: string }[];
}

export interface StoredRevision {
  readonly version: number;
  readonly editId: string;
  readonly before: StoredSide;
  readonly after: StoredSide;
  readonly by: string | null;
  readonly createdAt: Date;
}

const REVISION_COLUMNS = {
  version: revisions.version,
  editId: revisions.id,
  before: revisions.before,
  after: revisions.after,
  by: users.name,
  createdAt: revisions.createdAt,
};

/** The edits of a reading after `since`, in order. Whoever calls it has checked who may see the reading. */
export async function unsafeListRevisions(db: Db, readingId: string, since: number): Promise<StoredRevision[]> {
  const rows = await db
    .select(REVISION_COLUMNS)
    .from(revisions)
    .leftJoin(users, eq(users.id, revisions.authorId))
    .where(and(eq(revisions.readingId, readingId), gt(revisions.version, since)))
    .orderBy(asc(revisions.version));
  return rows.map((row) => ({ ...row, before: row.before as StoredSide, after: row.after as StoredSide }));
}

/** Some edits of a reading, the newest first: `limit` of those before version `before`. Whoever calls it has checked who may see them. */
export async function unsafeListRevisionsBack(db: Db, readingId: string, before: number, limit: number): Promise<StoredRevision[]> {
  const rows = await db
    .select(REVISION_COLUMNS)
    .from(revisions)
    .leftJoin(users, eq(users.id, revisions.authorId))
    .where(and(eq(revisions.readingId, readingId), lt(revisions.version, before)))
    .orderBy(desc(revisions.version))
    .limit(limit);
  return rows.map((row) => ({ ...row, before: row.before as StoredSide, after: row.after as StoredSide }));
}

/** The version that an edit made, when it was done already; null when it was not. */
export async function findRevisionVersion(db: Db, readingId: string, editId: string): Promise<number | null> {
  const [row] = await db
    .select({ version: revisions.version })
    .from(revisions)
    .where(and(eq(revisions.readingId, readingId), eq(revisions.id, editId)));
  return row?.version ?? null;
}

export interface NewRevision {
  readonly editId: string;
  readonly readingId: string;
  readonly version: number;
  readonly authorId: string;
  readonly before: StoredSide;
  readonly after: StoredSide;
  readonly createdAt: Date;
}

export async function insertRevision(db: Db, { editId, ...row }: NewRevision): Promise<void> {
  await db.insert(revisions).values({ id: editId, kind: 'edit', ...row });
}

/** Moves the reading to its next version. False when it was not at `from`: the caller did not hold its lock. */
export async function advanceReading(db: Db, readingId: string, from: number, state: 'open' | 'settled'): Promise<boolean> {
  const [result] = await db
    .update(readings)
    .set({ version: from + 1, state })
    .where(and(eq(readings.id, readingId), eq(readings.version, from)));
  return result.affectedRows === 1;
}

/** Rows sent in one statement. */
const CHUNK = 300;

/**
 * Writes what differs. Labels of both sides are changed in place, so that what hangs on them stays; new ones are inserted,
 * never over a row of another reading.
 */
export async function storeChange(db: Db, readingId: string, before: StoredSide, after: StoredSide): Promise<void> {
  const kept = new Set(after.labels.map((label) => label.id));
  const known = new Set(before.labels.map((label) => label.id));
  const gone = before.labels.filter((label) => !kept.has(label.id)).map((label) => label.id);
  if (gone.length > 0) await db.delete(labels).where(and(eq(labels.readingId, readingId), inArray(labels.id, gone)));
  await updateLabels(db, readingId, after.labels.filter((label) => known.has(label.id)));
  await addLabels(db, readingId, after.labels.filter((label) => !known.has(label.id)));
  await storeRegions(db, readingId, before.regions, after.regions);
  if (gone.length > 0 || kept.size !== known.size) await renumber(db, readingId);
}

/** `values(column)` in an upsert: what the row would have been. */
function proposed(column: { readonly name: string }) {
  return sql.raw(`values(\`${column.name}\`)`);
}

async function updateLabels(db: Db, readingId: string, changed: readonly StoredLabel[]): Promise<void> {
  const columns = ['startTick', 'endTick', 'keyTonicFifths', 'keyMode', 'numeralText', 'degreeStep', 'degreeAlter', 'quality', 'inversion', 'appliedStep', 'appliedAlter', 'appliedMode', 'special', 'numeral', 'state', 'certainty', 'tones', 'pivot'] as const;
  const set = Object.fromEntries(columns.map((column) => [column, proposed(labels[column])]));
  for (let at = 0; at < changed.length; at += CHUNK) {
    const rows = changed.slice(at, at + CHUNK).map((label) => labelRow(readingId, label, 0));
    await db.insert(labels).values(rows).onDuplicateKeyUpdate({ set });
  }
}

async function addLabels(db: Db, readingId: string, added: readonly StoredLabel[]): Promise<void> {
  for (let at = 0; at < added.length; at += CHUNK) {
    const chunk = added.slice(at, at + CHUNK);
    await db.insert(labels).values(chunk.map((label) => labelRow(readingId, label, 0)));
    const others = chunk.flatMap((label) => label.others.map((other, rank) => alternativeRow(label.id, other, rank)));
    if (others.length > 0) await db.insert(labelAlternatives).values(others);
  }
}

async function storeRegions(db: Db, readingId: string, before: readonly StoredRegion[], after: readonly StoredRegion[]): Promise<void> {
  const starts = before.map((region) => region.start);
  if (starts.length > 0) await db.delete(keyRegions).where(and(eq(keyRegions.readingId, readingId), inArray(keyRegions.startTick, starts)));
  if (after.length === 0) return;
  await db.insert(keyRegions).values(
    after.map((region) => ({ readingId, startTick: region.start, endTick: region.end, tonicFifths: region.key.tonic, mode: region.key.mode })),
  );
}

/** `position` counts labels in time order again. */
async function renumber(db: Db, readingId: string): Promise<void> {
  await db.execute(sql`
    update ${labels} join (
      select id, row_number() over (order by start_tick) - 1 as place from ${labels} where reading_id = ${readingId}
    ) as ranked on ranked.id = ${labels.id}
    set ${labels.position} = ranked.place
    where ${labels.readingId} = ${readingId} and ${labels.position} <> ranked.place`);
}

/** Remarks that hang on some labels. */
export async function listAttachedRemarks(db: Db, labelIds: readonly string[]) {
  if (labelIds.length === 0) return [];
  const rows = await db.select({ id: remarks.id, labelId: remarks.labelId }).from(remarks).where(inArray(remarks.labelId, [...labelIds]));
  return rows.flatMap(({ id, labelId }) => (labelId ? [{ id, labelId }] : []));
}

/** How many of the latest edits are looked through for remarks to hang up again. */
const LOOK_BACK = 200;

/** Hangs remarks back on labels that come again after an edit took them away. */
export async function reattachRemarks(db: Db, readingId: string, labelIds: readonly string[]): Promise<void> {
  if (labelIds.length === 0) return;
  const rows = await db
    .select({ before: revisions.before })
    .from(revisions)
    .where(eq(revisions.readingId, readingId))
    .orderBy(desc(revisions.version))
    .limit(LOOK_BACK);
  const back = new Set(labelIds);
  for (const { before } of rows) {
    for (const { id, labelId } of (before as StoredSide).remarks ?? []) {
      if (!back.has(labelId)) continue;
      await db.update(remarks).set({ labelId }).where(and(eq(remarks.id, id), eq(remarks.readingId, readingId), isNull(remarks.labelId)));
    }
  }
}
