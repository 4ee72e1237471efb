import { boolean, index, mysqlEnum, mysqlTable } from 'drizzle-orm/mysql-core';
import { SIGN_IN_ATTEMPT_KINDS } from '@/lib/vocabularies';
import { createdAt, id, sha256, utcDateTime } from '../columns';
import { users } from './departments';

/** A one-time link; only the token's hash is kept. */
export const signInLinks = mysqlTable(
  'sign_in_links',
  {
    tokenHash: sha256('token_hash').primaryKey(),
    userId: id('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    expiresAt: utcDateTime('expires_at').notNull(),
    usedAt: utcDateTime('used_at'),
    createdAt: createdAt(),
  },
  (t) => [index('sign_in_links_user').on(t.userId)],
);

/** Tries to sign in, for the rate limit. Keyed hashes only: no e-mail and no network address is kept. */
export const signInAttempts = mysqlTable(
  'sign_in_attempts',
  {
    id: id('id').primaryKey(),
    kind: mysqlEnum('kind', SIGN_IN_ATTEMPT_KINDS).notNull(),
    emailHash: sha256('email_hash').notNull(),
    addressHash: sha256('address_hash').notNull(),
    succeeded: boolean('succeeded').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('sign_in_attempts_email').on(t.emailHash, t.createdAt),
    index('sign_in_attempts_address').on(t.addressHash, t.createdAt),
    index('sign_in_attempts_created').on(t.createdAt),
  ],
);
