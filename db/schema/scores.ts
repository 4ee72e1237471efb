import { index, int, mysqlEnum, mysqlTable, text, tinyint, varchar } from 'drizzle-orm/mysql-core';
import { SCORE_STATES } from '@/lib/vocabularies';
import { createdAt, id, json, sha256, shortText, updatedAt, utcDateTime } from '../columns';
import { departments, users } from './departments';

/** Why a file was refused (lib/score ScoreError). */
export interface Refusal {
  readonly code: string;
  readonly message: string;
  /** 1-based, in the XML text. */
  readonly line?: number;
  readonly element?: string;
}

/** A bar of the score, in ticks; see lib/score Bar. */
export interface ScoreBar {
  readonly index: number;
  readonly number: string;
  readonly start: number;
  readonly length: number;
  /** Starts of the felt beats, in ticks from the bar's start; absent in scores read before this was kept. */
  readonly beats?: readonly number[];
}

export interface ScoreRemark {
  readonly code: string;
  readonly message: string;
  readonly line?: number;
  readonly bar?: number;
}

/** An uploaded MusicXML file (stored under its SHA-256) and what was read from it; the read fields are null until `ready`. */
export const scores = mysqlTable(
  'scores',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    uploadedBy: id('uploaded_by')
      .notNull()
      .references(() => users.id),
    title: shortText('title').notNull(),
    composer: shortText('composer').notNull(),
    work: shortText('work').notNull().default(''),
    /** Where the file comes from, in the uploader's words. */
    source: text('source').notNull(),
    /** What allows its use, in the uploader's words. */
    rights: text('rights').notNull(),
    fileName: varchar('file_name', { length: 255 }).notNull(),
    sha256: sha256('sha256').notNull(),
    byteSize: int('byte_size').notNull(),
    state: mysqlEnum('state', SCORE_STATES).notNull().default('queued'),
    refusal: json<Refusal>('refusal'),
    ticksPerQuarter: int('ticks_per_quarter'),
    bars: json<readonly ScoreBar[]>('bars'),
    noteCount: int('note_count'),
    /** The first key signature: sharps positive, flats negative. */
    keyFifths: tinyint('key_fifths'),
    warnings: json<readonly ScoreRemark[]>('warnings'),
    deletedAt: utcDateTime('deleted_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [
    index('scores_department').on(t.departmentId, t.deletedAt, t.createdAt),
    index('scores_department_composer').on(t.departmentId, t.composer),
    index('scores_sha256').on(t.departmentId, t.sha256),
  ],
);

/** A bar range of a score. Bars are indexes into the score's bars, both ends included; ticks are [start, end). */
export const excerpts = mysqlTable(
  'excerpts',
  {
    id: id('id').primaryKey(),
    scoreId: id('score_id')
      .notNull()
      .references(() => scores.id),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    title: shortText('title').notNull(),
    purpose: text('purpose').notNull(),
    firstBar: int('first_bar').notNull(),
    lastBar: int('last_bar').notNull(),
    startTick: int('start_tick').notNull(),
    endTick: int('end_tick').notNull(),
    createdBy: id('created_by')
      .notNull()
      .references(() => users.id),
    deletedAt: utcDateTime('deleted_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [index('excerpts_score').on(t.scoreId), index('excerpts_department').on(t.departmentId, t.deletedAt)],
);
