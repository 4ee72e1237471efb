import { index, int, mysqlEnum, mysqlTable, primaryKey, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import { type Paper, ROLES } from '@/lib/vocabularies';
import { binaryText, createdAt, id, json, shortText, updatedAt, utcDateTime } from '../columns';

export interface DepartmentSettings {
  /** BCP 47; what the handouts' paper and dates follow. */
  readonly locale?: string;
  readonly paper?: Paper;
}

/** The tenant: its members, its library, its courses. */
export const departments = mysqlTable('departments', {
  id: id('id').primaryKey(),
  name: shortText('name').notNull(),
  slug: varchar('slug', { length: 80 }).notNull().unique(),
  settings: json<DepartmentSettings>('settings').notNull().$default(() => ({})),
  createdAt: createdAt(),
  updatedAt: updatedAt(),
});

export interface UserPreferences {
  readonly theme?: 'system' | 'day' | 'night';
  /** Which department a person of several is working in. */
  readonly departmentId?: string;
  /** Mail about remarks; on unless switched off. */
  readonly remarkMail?: boolean;
}

export const users = mysqlTable('users', {
  id: id('id').primaryKey(),
  /** Lower case. */
  email: binaryText('email', 254).notNull().unique(),
  name: shortText('name').notNull(),
  /** argon2id in PHC form; null for a person who only signs in by link or by the department's provider. */
  passwordHash: varchar('password_hash', { length: 255 }),
  emailVerifiedAt: utcDateTime('email_verified_at'),
  /** Sessions carry the epoch they began in; raising it ends them all. */
  sessionEpoch: int('session_epoch').notNull().default(0),
  preferences: json<UserPreferences>('preferences').notNull().$default(() => ({})),
  /** Set when the person's data was deleted: name and e-mail are placeholders from then on. */
  deletedAt: utcDateTime('deleted_at'),
  createdAt: createdAt(),
  updatedAt: updatedAt(),
});

/** A person's identity at the department's OpenID provider. */
export const accounts = mysqlTable(
  'accounts',
  {
    id: id('id').primaryKey(),
    userId: id('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** The issuer's address. */
    provider: binaryText('provider', 255).notNull(),
    providerAccountId: binaryText('provider_account_id', 255).notNull(),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('accounts_provider_identity').on(t.provider, t.providerAccountId), index('accounts_user').on(t.userId)],
);

export const departmentMembers = mysqlTable(
  'department_members',
  {
    departmentId: id('department_id')
      .notNull()
      .references(() => departments.id),
    userId: id('user_id')
      .notNull()
      .references(() => users.id),
    role: mysqlEnum('role', ROLES).notNull(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (t) => [primaryKey({ columns: [t.departmentId, t.userId] }), index('department_members_user').on(t.userId)],
);
