import { type SQL, and, asc, count, countDistinct, desc, eq, exists, inArray, isNotNull, isNull, like, ne, not, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { excerpts, keyRegions, labels, readings, scores, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import type { Mode } from '@/lib/vocabularies';

export const LIBRARY_STATES = ['in-work', 'ready', 'refused', 'uncut'] as const;
/** `in-work`: queued or being read; `uncut`: ready, with no excerpt yet. */
export type LibraryState = (typeof LIBRARY_STATES)[number];

export const LIBRARY_SORTS = ['added', 'title', 'composer'] as const;
export type LibrarySort = (typeof LIBRARY_SORTS)[number];

export const LIBRARY_PAGE_SIZE = 40;

export interface LibraryFilter {
  /** Words that must all occur in the score's or one of its excerpts' names; '' for all. */
  readonly words: string;
  readonly composer: string | null;
  readonly key: { readonly tonicFifths: number; readonly mode: Mode } | null;
  readonly state: LibraryState | null;
  readonly uploadedBy: string | null;
  /** Only where a visible reading has a diminished or half-diminished seventh chord of another degree. */
  readonly secondaryDiminished: boolean;
  readonly sort: LibrarySort;
  readonly descending: boolean;
  /** 1-based. */
  readonly page: number;
}

function inReach(actor: Actor): SQL {
  return and(eq(scores.departmentId, actor.departmentId), isNull(scores.deletedAt)) as SQL;
}

/** `%` and `_` in what a person typed are themselves. */
function containing(word: string): string {
  return `%${word.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
}

function hasExcerpt(db: Db, ...where: readonly (SQL | undefined)[]): SQL {
  return exists(
    db
      .select({ one: sql`1` })
      .from(excerpts)
      .where(and(eq(excerpts.scoreId, scores.id), isNull(excerpts.deletedAt), ...where)),
  );
}

function wordsMatch(db: Db, words: string): SQL[] {
  const each = words.split(/\s+/).filter(Boolean).slice(0, 8).map(containing);
  return each.map(
    (word) =>
      or(
        like(scores.title, word),
        like(scores.composer, word),
        like(scores.work, word),
        hasExcerpt(db, or(like(excerpts.title, word), like(excerpts.purpose, word))),
      ) as SQL,
  );
}

/** Readings whose labels may answer a search of the actor: the engine's, their own, and shared ones. */
function searchable(actor: Actor): SQL {
  return and(
    isNull(readings.deletedAt),
    or(
      eq(readings.kind, 'engine'),
      and(eq(readings.ownerId, actor.userId), ne(readings.kind, 'submission')),
      and(eq(readings.kind, 'person'), ne(readings.shared, 'private')),
    ),
  ) as SQL;
}

function beginsIn(db: Db, actor: Actor, key: { tonicFifths: number; mode: Mode }): SQL {
  const opening = db
    .select({ one: sql`1` })
    .from(readings)
    .innerJoin(keyRegions, and(eq(keyRegions.readingId, readings.id), eq(keyRegions.startTick, readings.startTick)))
    .where(and(eq(readings.excerptId, excerpts.id), searchable(actor), eq(keyRegions.tonicFifths, key.tonicFifths), eq(keyRegions.mode, key.mode)));
  return hasExcerpt(db, exists(opening));
}

function hasSecondaryDiminished(db: Db, actor: Actor): SQL {
  const chord = db
    .select({ one: sql`1` })
    .from(readings)
    .innerJoin(labels, eq(labels.readingId, readings.id))
    .where(
      and(
        eq(readings.excerptId, excerpts.id),
        searchable(actor),
        isNotNull(labels.appliedStep),
        inArray(labels.quality, ['diminished-seventh', 'half-diminished-seventh']),
      ),
    );
  return hasExcerpt(db, exists(chord));
}

function stateMatches(db: Db, state: LibraryState): SQL {
  if (state === 'in-work') return inArray(scores.state, ['queued', 'reading']);
  if (state === 'uncut') return and(eq(scores.state, 'ready'), not(hasExcerpt(db))) as SQL;
  return eq(scores.state, state);
}

function conditionOf(db: Db, actor: Actor, filter: LibraryFilter): SQL {
  return and(
    inReach(actor),
    ...wordsMatch(db, filter.words),
    filter.composer === null ? undefined : eq(scores.composer, filter.composer),
    filter.uploadedBy === null ? undefined : eq(scores.uploadedBy, filter.uploadedBy),
    filter.state === null ? undefined : stateMatches(db, filter.state),
    filter.key === null ? undefined : beginsIn(db, actor, filter.key),
    filter.secondaryDiminished ? hasSecondaryDiminished(db, actor) : undefined,
  ) as SQL;
}

const SORT_COLUMN = { added: scores.createdAt, title: scores.title, composer: scores.composer } as const;

/** One page of the library's scores, and how many there are in all. */
export async function listLibrary(db: Db, actor: Actor, filter: LibraryFilter) {
  const condition = conditionOf(db, actor, filter);
  const direction = filter.descending ? desc : asc;
  const rows = await db
    .select({
      id: scores.id,
      title: scores.title,
      composer: scores.composer,
      work: scores.work,
      fileName: scores.fileName,
      state: scores.state,
      refusal: scores.refusal,
      barCount: sql<number | null>`json_length(${scores.bars})`,
      keyFifths: scores.keyFifths,
      warningCount: sql<number>`coalesce(json_length(${scores.warnings}), 0)`.mapWith(Number),
      uploaderName: users.name,
      createdAt: scores.createdAt,
    })
    .from(scores)
    .innerJoin(users, eq(users.id, scores.uploadedBy))
    .where(condition)
    .orderBy(direction(SORT_COLUMN[filter.sort]), direction(scores.createdAt), asc(scores.id))
    .limit(LIBRARY_PAGE_SIZE)
    .offset((filter.page - 1) * LIBRARY_PAGE_SIZE);
  const [total] = await db.select({ n: count() }).from(scores).where(condition);
  return { rows, total: total?.n ?? 0 };
}
export type LibraryRow = Awaited<ReturnType<typeof listLibrary>>['rows'][number];

/** What the facets offer, over the whole library. */
export async function getLibraryFacets(db: Db, actor: Actor) {
  const composers = await db
    .select({ composer: scores.composer, n: count() })
    .from(scores)
    .where(and(inReach(actor), ne(scores.composer, '')))
    .groupBy(scores.composer)
    .orderBy(asc(scores.composer));
  const uploaders = await db
    .select({ id: users.id, name: users.name, n: count() })
    .from(scores)
    .innerJoin(users, eq(users.id, scores.uploadedBy))
    .where(inReach(actor))
    .groupBy(users.id, users.name)
    .orderBy(asc(users.name));
  return { composers, uploaders, keys: await listOpeningKeyFacet(db, actor), total: await countScores(db, actor) };
}
export type LibraryFacets = Awaited<ReturnType<typeof getLibraryFacets>>;

async function countScores(db: Db, actor: Actor): Promise<number> {
  const [row] = await db.select({ n: count() }).from(scores).where(inReach(actor));
  return row?.n ?? 0;
}

async function listOpeningKeyFacet(db: Db, actor: Actor) {
  return db
    .select({ tonicFifths: keyRegions.tonicFifths, mode: keyRegions.mode, n: countDistinct(scores.id) })
    .from(scores)
    .innerJoin(excerpts, and(eq(excerpts.scoreId, scores.id), isNull(excerpts.deletedAt)))
    .innerJoin(readings, eq(readings.excerptId, excerpts.id))
    .innerJoin(keyRegions, and(eq(keyRegions.readingId, readings.id), eq(keyRegions.startTick, readings.startTick)))
    .where(and(inReach(actor), searchable(actor)))
    .groupBy(keyRegions.tonicFifths, keyRegions.mode)
    .orderBy(asc(keyRegions.tonicFifths), asc(keyRegions.mode));
}
