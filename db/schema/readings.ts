import {
  type AnyMySqlColumn,
  bigint,
  boolean,
  double,
  index,
  int,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  text,
  tinyint,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core';
import type { MarkedTone } from '@/lib/harmony/reading';
import type { Numeral } from '@/lib/theory/numeral';
import { LABEL_STATES, MODES, QUALITIES, READING_KINDS, READING_STATES, SHARINGS, SPECIALS } from '@/lib/vocabularies';
import { binaryText, createdAt, id, json, sha256, shortText, updatedAt, utcDateTime } from '../columns';
import { departments, users } from './departments';
import { excerpts } from './scores';

/** One person's (or the engine's) analysis of an excerpt: its regions and its labels each tile [startTick, endTick). */
export const readings = mysqlTable(
  'readings',
  {
    id: id('id').primaryKey(),
    excerptId: id('excerpt_id')
      .notNull()
      .references(() => excerpts.id),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    /** Null for the engine's own. */
    ownerId: id('owner_id').references(() => users.id),
    kind: mysqlEnum('kind', READING_KINDS).notNull(),
    title: shortText('title').notNull(),
    state: mysqlEnum('state', READING_STATES).notNull().default('open'),
    shared: mysqlEnum('shared', SHARINGS).notNull().default('private'),
    /** Counts edits; an edit names the version it was made on and is refused when that is not the newest. */
    version: int('version').notNull().default(0),
    startTick: int('start_tick').notNull(),
    endTick: int('end_tick').notNull(),
    basedOn: id('based_on').references((): AnyMySqlColumn => readings.id, { onDelete: 'set null' }),
    deletedAt: utcDateTime('deleted_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [
    index('readings_excerpt').on(t.excerptId, t.kind),
    index('readings_department').on(t.departmentId),
    index('readings_owner').on(t.ownerId),
  ],
);

export const keyRegions = mysqlTable(
  'key_regions',
  {
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    startTick: int('start_tick').notNull(),
    endTick: int('end_tick').notNull(),
    tonicFifths: tinyint('tonic_fifths').notNull(),
    mode: mysqlEnum('mode', MODES).notNull(),
  },
  (t) => [primaryKey({ columns: [t.readingId, t.startTick] })],
);

/**
 * A numeral over a span. `numeral` is the whole value; the columns repeat what passage search and "what to reteach"
 * ask for, and `applied…` is the nearest target. All are null for a blank.
 */
export const labels = mysqlTable(
  'labels',
  {
    id: id('id').primaryKey(),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    /** 0-based place in the reading. */
    position: int('position').notNull(),
    startTick: int('start_tick').notNull(),
    endTick: int('end_tick').notNull(),
    keyTonicFifths: tinyint('key_tonic_fifths').notNull(),
    keyMode: mysqlEnum('key_mode', MODES).notNull(),
    /** As formatNumeral prints it with the default conventions. */
    numeralText: binaryText('numeral_text', 60),
    degreeStep: tinyint('degree_step'),
    degreeAlter: tinyint('degree_alter'),
    quality: mysqlEnum('quality', QUALITIES),
    inversion: tinyint('inversion'),
    appliedStep: tinyint('applied_step'),
    appliedAlter: tinyint('applied_alter'),
    appliedMode: mysqlEnum('applied_mode', MODES),
    special: mysqlEnum('special', SPECIALS),
    numeral: json<Numeral>('numeral'),
    state: mysqlEnum('state', LABEL_STATES).notNull(),
    /** Kinds that a person gave to notes of the span (lib/harmony/reading, MarkedTone); null for none. */
    tones: json<readonly MarkedTone[]>('tones'),
    /** Read in the key after it as well. */
    pivot: boolean('pivot').notNull().default(false),
    certainty: double('certainty'),
    /** In a key: the span is a question. */
    asked: boolean('asked').notNull().default(true),
  },
  (t) => [
    index('labels_reading').on(t.readingId, t.position),
    index('labels_chord').on(t.quality, t.degreeStep, t.degreeAlter, t.inversion, t.appliedStep),
    index('labels_numeral_text').on(t.numeralText),
  ],
);

/** The engine's runners-up for a label, best first; in an answer key also what else is right, and for how much. */
export const labelAlternatives = mysqlTable(
  'label_alternatives',
  {
    labelId: id('label_id')
      .notNull()
      .references(() => labels.id, { onDelete: 'cascade' }),
    rank: int('rank').notNull(),
    keyTonicFifths: tinyint('key_tonic_fifths').notNull(),
    keyMode: mysqlEnum('key_mode', MODES).notNull(),
    numeralText: binaryText('numeral_text', 60).notNull(),
    numeral: json<Numeral>('numeral').notNull(),
    certainty: double('certainty'),
    /** In a key: this is right too. */
    accepted: boolean('accepted').notNull().default(false),
    /** Share of the label's points when accepted, 0–1; null for all. */
    credit: double('credit'),
  },
  (t) => [primaryKey({ columns: [t.labelId, t.rank] })],
);

/** A comment on a label, on a bar, or on the whole reading; `threadId` is the remark it answers. */
export const remarks = mysqlTable(
  'remarks',
  {
    id: id('id').primaryKey(),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    labelId: id('label_id').references(() => labels.id, { onDelete: 'set null' }),
    barIndex: int('bar_index'),
    threadId: id('thread_id').references((): AnyMySqlColumn => remarks.id, { onDelete: 'cascade' }),
    authorId: id('author_id')
      .notNull()
      .references(() => users.id),
    /** Counts up with every remark: two of the same millisecond keep the order they were written in. */
    written: bigint('written', { mode: 'number' }).autoincrement().notNull().unique('remarks_written'),
    body: text('body').notNull(),
    resolvedAt: utcDateTime('resolved_at'),
    resolvedBy: id('resolved_by').references(() => users.id),
    deletedAt: utcDateTime('deleted_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [index('remarks_reading').on(t.readingId, t.createdAt), index('remarks_author').on(t.authorId)],
);

/** One row per edit of a reading: what it took away and what it put there. `version` is the one it made. */
export const revisions = mysqlTable(
  'revisions',
  {
    id: id('id').primaryKey(),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    version: int('version').notNull(),
    /** Null for the engine. */
    authorId: id('author_id').references(() => users.id),
    kind: varchar('kind', { length: 40 }).notNull(),
    before: json<object>('before').notNull(),
    after: json<object>('after').notNull(),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('revisions_reading_version').on(t.readingId, t.version)],
);

/** A handout's link for people who are not signed in: read-only, revocable. */
export const shareLinks = mysqlTable(
  'share_links',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    tokenHash: sha256('token_hash').notNull().unique(),
    createdBy: id('created_by')
      .notNull()
      .references(() => users.id),
    revokedAt: utcDateTime('revoked_at'),
    createdAt: createdAt(),
  },
  (t) => [index('share_links_reading').on(t.readingId)],
);
