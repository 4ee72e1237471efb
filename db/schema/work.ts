import { index, int, mediumtext, mysqlEnum, mysqlTable, text, varchar } from 'drizzle-orm/mysql-core';
import { JOB_STATES, OUTBOX_STATES } from '@/lib/vocabularies';
import { createdAt, id, json, updatedAt, utcDateTime } from '../columns';
import { departments, users } from './departments';

/** Work off the request: claimed with SKIP LOCKED, leased, retried with back-off, dead after `maxAttempts`. */
export const jobs = mysqlTable(
  'jobs',
  {
    id: id('id').primaryKey(),
    kind: varchar('kind', { length: 60 }).notNull(),
    payload: json<object>('payload').notNull(),
    state: mysqlEnum('state', JOB_STATES).notNull().default('queued'),
    attempts: int('attempts').notNull().default(0),
    maxAttempts: int('max_attempts').notNull().default(5),
    runAfter: utcDateTime('run_after')
      .notNull()
      .$defaultFn(() => new Date()),
    leasedUntil: utcDateTime('leased_until'),
    leasedBy: varchar('leased_by', { length: 80 }),
    lastError: text('last_error'),
    /** One live job per key: a second one with it is not added. Cleared when the job ends. */
    dedupeKey: varchar('dedupe_key', { length: 160 }).unique(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
    finishedAt: utcDateTime('finished_at'),
  },
  (t) => [index('jobs_claim').on(t.state, t.runAfter), index('jobs_lease').on(t.state, t.leasedUntil)],
);

/** Mail to send. Written in the transaction of what it tells of. */
export const outbox = mysqlTable(
  'outbox',
  {
    id: id('id').primaryKey(),
    toAddress: varchar('to_address', { length: 254 }).notNull(),
    subject: varchar('subject', { length: 300 }).notNull(),
    textBody: mediumtext('text_body').notNull(),
    htmlBody: mediumtext('html_body'),
    state: mysqlEnum('state', OUTBOX_STATES).notNull().default('queued'),
    attempts: int('attempts').notNull().default(0),
    maxAttempts: int('max_attempts').notNull().default(8),
    runAfter: utcDateTime('run_after')
      .notNull()
      .$defaultFn(() => new Date()),
    leasedUntil: utcDateTime('leased_until'),
    leasedBy: varchar('leased_by', { length: 80 }),
    lastError: text('last_error'),
    sentAt: utcDateTime('sent_at'),
    createdAt: createdAt(),
  },
  (t) => [index('outbox_claim').on(t.state, t.runAfter)],
);

export const workerHeartbeats = mysqlTable('worker_heartbeats', {
  workerId: varchar('worker_id', { length: 80 }).primaryKey(),
  seenAt: utcDateTime('seen_at').notNull(),
});

/** Who did what, for the department's owner. Ids and settings only: no text that a person wrote, no marks. */
export const auditEvents = mysqlTable(
  'audit_events',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    /** Null for the system. */
    actorId: id('actor_id').references(() => users.id),
    verb: varchar('verb', { length: 80 }).notNull(),
    subjectKind: varchar('subject_kind', { length: 40 }).notNull(),
    subjectId: varchar('subject_id', { length: 80 }).notNull(),
    details: json<Readonly<Record<string, unknown>>>('details').notNull().$default(() => ({})),
    createdAt: createdAt(),
  },
  (t) => [index('audit_events_department').on(t.departmentId, t.createdAt), index('audit_events_actor').on(t.actorId)],
);
