import { index, int, mysqlEnum, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core';
import type { PrintOptions } from '@/lib/handout/print-options';
import { PRINT_STATES } from '@/lib/vocabularies';
import { createdAt, id, json, sha256, shortText, updatedAt } from '../columns';
import { courses } from './courses';
import { departments, users } from './departments';
import { readings } from './readings';

/**
 * A handout as printed from one version of a reading. The same order on the same version is the same print; the files
 * are in the object store.
 */
export const handoutPrints = mysqlTable(
  'handout_prints',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id, { onDelete: 'cascade' }),
    readingVersion: int('reading_version').notNull(),
    requestedBy: id('requested_by')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** The course whose conventions it follows; null for the usual ones. */
    courseId: id('course_id').references(() => courses.id, { onDelete: 'set null' }),
    options: json<PrintOptions>('options').notNull(),
    /** Of requester, course, its conventions and the options, so that the same order is found again. */
    orderSha256: sha256('order_sha256').notNull(),
    state: mysqlEnum('state', PRINT_STATES).notNull().default('queued'),
    /** A sentence for the person who ordered it. */
    failure: shortText('failure'),
    pageCount: int('page_count'),
    /** JSON list of the pages' SVG texts. */
    pagesSha256: sha256('pages_sha256'),
    pdfSha256: sha256('pdf_sha256'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [
    uniqueIndex('handout_prints_order').on(t.readingId, t.readingVersion, t.orderSha256),
    index('handout_prints_department').on(t.departmentId, t.createdAt),
  ],
);
