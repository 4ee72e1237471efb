import { double, int, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core';
import { id } from '../columns';
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
  },
  (t) => [uniqueIndex('questions_span').on(t.assignmentId, t.startTick)],
);
