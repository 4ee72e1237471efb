import { index, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core';
import { COURSE_ROLES, ROLES } from '@/lib/vocabularies';
import { binaryText, createdAt, id, json, sha256, shortText, updatedAt, utcDateTime } from '../columns';
import { departments, users } from './departments';

export const courses = mysqlTable(
  'courses',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    title: shortText('title').notNull(),
    term: varchar('term', { length: 80 }).notNull(),
    code: varchar('code', { length: 40 }).notNull(),
    /** The course's convention sheet (lib/theory/conventions); null for the defaults. */
    conventions: json<object>('conventions'),
    /** What a student types to join; null when the course is closed to that. Upper case. */
    enrolmentCode: binaryText('enrolment_code', 20).unique(),
    archivedAt: utcDateTime('archived_at'),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [index('courses_department').on(t.departmentId)],
);

export const courseMembers = mysqlTable(
  'course_members',
  {
    courseId: id('course_id')
      .notNull()
      .references(() => courses.id),
    userId: id('user_id')
      .notNull()
      .references(() => users.id),
    role: mysqlEnum('role', COURSE_ROLES).notNull(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [primaryKey({ columns: [t.courseId, t.userId] }), index('course_members_user').on(t.userId)],
);

/** An invitation by mail into a department and, with `courseId`, into one of its courses. */
export const invitations = mysqlTable(
  'invitations',
  {
    id: id('id').primaryKey(),
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    courseId: id('course_id').references(() => courses.id),
    /** Lower case. */
    email: binaryText('email', 254).notNull(),
    role: mysqlEnum('role', ROLES).notNull(),
    tokenHash: sha256('token_hash').notNull().unique(),
    expiresAt: utcDateTime('expires_at').notNull(),
    acceptedAt: utcDateTime('accepted_at'),
    revokedAt: utcDateTime('revoked_at'),
    invitedBy: id('invited_by')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [index('invitations_department_email').on(t.departmentId, t.email)],
);
