import { boolean, double, index, int, mysqlEnum, mysqlTable, text, uniqueIndex } from 'drizzle-orm/mysql-core';
import { ASSIGNMENT_STATES, SEGMENTATIONS, SUBMISSION_STATES, VERDICTS } from '@/lib/vocabularies';
import { createdAt, id, json, shortText, updatedAt, utcDateTime } from '../columns';
import { courses } from './courses';
import { users } from './departments';
import { labels, readings } from './readings';
import { excerpts } from './scores';

export const assignments = mysqlTable(
  'assignments',
  {
    id: id('id').primaryKey(),
    courseId: id('course_id')
      .notNull()
      .references(() => courses.id),
    excerptId: id('excerpt_id')
      .notNull()
      .references(() => excerpts.id),
    keyReadingId: id('key_reading_id')
      .notNull()
      .references(() => readings.id),
    title: shortText('title').notNull(),
    instructions: text('instructions').notNull(),
    segmentation: mysqlEnum('segmentation', SEGMENTATIONS).notNull().default('given'),
    /** The key regions are shown to the student. */
    keysGiven: boolean('keys_given').notNull().default(true),
    /** Labels that are not asked are printed for the student, as a start; else their spans are empty. */
    othersGiven: boolean('others_given').notNull().default(true),
    pointsPerLabel: double('points_per_label').notNull().default(1),
    /** lib/marking's rubric. */
    rubric: json<object>('rubric').notNull().$default(() => ({})),
    opensAt: utcDateTime('opens_at'),
    dueAt: utcDateTime('due_at'),
    closesAt: utcDateTime('closes_at'),
    attempts: int('attempts').notNull().default(1),
    state: mysqlEnum('state', ASSIGNMENT_STATES).notNull().default('draft'),
    showKeyAfterRelease: boolean('show_key_after_release').notNull().default(false),
    createdBy: id('created_by')
      .notNull()
      .references(() => users.id),
    deletedAt: utcDateTime('deleted_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [index('assignments_course').on(t.courseId), index('assignments_key').on(t.keyReadingId)],
);

export const submissions = mysqlTable(
  'submissions',
  {
    id: id('id').primaryKey(),
    assignmentId: id('assignment_id')
      .notNull()
      .references(() => assignments.id),
    studentId: id('student_id')
      .notNull()
      .references(() => users.id),
    readingId: id('reading_id')
      .notNull()
      .references(() => readings.id),
    /** 1-based. */
    attempt: int('attempt').notNull(),
    state: mysqlEnum('state', SUBMISSION_STATES).notNull().default('working'),
    handedInAt: utcDateTime('handed_in_at'),
    releasedAt: utcDateTime('released_at'),
    points: double('points'),
    maxPoints: double('max_points'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [
    uniqueIndex('submissions_attempt').on(t.assignmentId, t.studentId, t.attempt),
    index('submissions_student').on(t.studentId),
    index('submissions_reading').on(t.readingId),
  ],
);

/** The mark of one asked span: what the comparison proposed, and what a person put in its place. */
export const marks = mysqlTable(
  'marks',
  {
    id: id('id').primaryKey(),
    submissionId: id('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'cascade' }),
    keyLabelId: id('key_label_id').references(() => labels.id, { onDelete: 'set null' }),
    startTick: int('start_tick').notNull(),
    endTick: int('end_tick').notNull(),
    verdict: mysqlEnum('verdict', VERDICTS).notNull(),
    points: double('points').notNull(),
    maxPoints: double('max_points').notNull(),
    /** The span mark of lib/marking as proposed, whole. */
    proposed: json<object>('proposed').notNull(),
    overridePoints: double('override_points'),
    overrideVerdict: mysqlEnum('override_verdict', VERDICTS),
    remark: text('remark'),
    reasons: json<readonly string[]>('reasons').notNull().$default(() => []),
    markedBy: id('marked_by').references(() => users.id),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [uniqueIndex('marks_span').on(t.submissionId, t.startTick), index('marks_key_label').on(t.keyLabelId, t.verdict)],
);
