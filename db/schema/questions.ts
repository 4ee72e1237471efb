import { double, int, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core';
import type { Framed } from '@/lib/marking/key-reading';
import { id, json } from '../columns';
import { assignments } from './assignments';

/**
 * What an assignment asks: one row per asked span of its key. The span is named by where the key's label starts, not
 * by the label's id, so that editing the key at the desk does not lose the question.
 */
export const questions = mysqlTable(
  'questions',
  {
    id: id('id').primaryKey(),
    assignmentId: id('assignment_id')
      .notNull()
      .references(() => assignments.id, { onDelete: 'cascade' }),
    startTick: int('start_tick').notNull(),
    /** Full marks; null: the assignment's points per label. */
    points: double('points'),
    /** What is right beside the key's label. Kept here, not with the key's labels: editing the key must not lose them. */
    alternatives: json<readonly Framed[]>('alternatives').notNull().$default(() => []),
  },
  (t) => [uniqueIndex('questions_span').on(t.assignmentId, t.startTick)],
);
