import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { accounts, departmentMembers, departments, users } from '@/db/schema';
import type { UserPreferences } from '@/db/schema/departments';
import type { Actor } from '@/lib/auth/actor';
import { normalEmail } from '@/lib/auth/email';
import type { Role } from '@/lib/vocabularies';

export interface Membership {
  readonly departmentId: string;
  readonly departmentName: string;
  readonly role: Role;
}

/** The departments a person belongs to, oldest membership first. */
export async function getMemberships(db: Db, userId: string): Promise<Membership[]> {
  return db
    .select({ departmentId: departments.id, departmentName: departments.name, role: departmentMembers.role })
    .from(departmentMembers)
    .innerJoin(departments, eq(departments.id, departmentMembers.departmentId))
    .where(eq(departmentMembers.userId, userId))
    .orderBy(asc(departmentMembers.createdAt), asc(departments.id));
}

/**
 * The person of a session, in the department they last chose (or else their first). Null when the session's epoch is
 * over (password changed, signed out everywhere), the person's data was deleted, or they belong to no department now.
 */
export async function findActor(db: Db, userId: string, epoch: number): Promise<Actor | null> {
  const [row] = await db
    .select({ userId: users.id, name: users.name, email: users.email, departmentId: departmentMembers.departmentId, role: departmentMembers.role })
    .from(users)
    .innerJoin(departmentMembers, eq(departmentMembers.userId, users.id))
    .where(and(eq(users.id, userId), eq(users.sessionEpoch, epoch), isNull(users.deletedAt)))
    .orderBy(
      sql`${departmentMembers.departmentId} = json_value(${users.preferences}, '$.departmentId') desc`,
      asc(departmentMembers.createdAt),
      asc(departmentMembers.departmentId),
    )
    .limit(1);
  return row ?? null;
}

export interface SignInUser {
  readonly id: string;
  readonly name: string;
  readonly passwordHash: string | null;
  readonly sessionEpoch: number;
}

/** For signing in only, before there is an actor: the one query that reads a password hash by e-mail. */
export async function unsafeFindUserForSignIn(db: Db, email: string): Promise<SignInUser | null> {
  const [row] = await db
    .select({ id: users.id, name: users.name, passwordHash: users.passwordHash, sessionEpoch: users.sessionEpoch })
    .from(users)
    .where(and(eq(users.email, normalEmail(email)), isNull(users.deletedAt)));
  return row ?? null;
}

/** For signing in only: the same person by id, when a link or a provider has told who it is. */
export async function unsafeFindUserById(db: Db, userId: string): Promise<(SignInUser & { readonly email: string }) | null> {
  const [row] = await db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      passwordHash: users.passwordHash,
      sessionEpoch: users.sessionEpoch,
    })
    .from(users)
    .where(and(eq(users.id, userId), isNull(users.deletedAt)));
  return row ?? null;
}

export async function findUserOfIdentity(db: Db, provider: string, subject: string): Promise<string | null> {
  const [row] = await db
    .select({ userId: accounts.userId })
    .from(accounts)
    .where(and(eq(accounts.provider, provider), eq(accounts.providerAccountId, subject)));
  return row?.userId ?? null;
}

export interface OwnAccount {
  readonly name: string;
  readonly email: string;
  readonly hasPassword: boolean;
  readonly preferences: UserPreferences;
  readonly createdAt: Date;
}

/** The actor's own account, as their account page shows it. */
export async function getOwnAccount(db: Db, actor: Actor): Promise<OwnAccount> {
  const [row] = await db
    .select({
      name: users.name,
      email: users.email,
      hasPassword: sql<number>`${users.passwordHash} is not null`,
      preferences: users.preferences,
      createdAt: users.createdAt,
    })
    .from(users)
    .where(eq(users.id, actor.userId));
  if (!row) throw new Error('an actor has an account');
  return { ...row, hasPassword: Boolean(row.hasPassword) };
}
