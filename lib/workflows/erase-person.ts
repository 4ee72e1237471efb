import { and, eq, inArray, notInArray, sql } from 'drizzle-orm';
import {
  accounts,
  assignments,
  courseMembers,
  departmentMembers,
  handoutPrints,
  invitations,
  outbox,
  readings,
  signInLinks,
  submissions,
  users,
} from '@/db/schema';
import type { Deps } from './deps';

export const ERASED_NAME = 'Former member';

/**
 * Deletes a person's data; call it in a transaction. Who they are goes: name, e-mail, password, identities, links,
 * memberships, mails and invitations to them. What only they saw goes: private readings, submissions not handed in. What
 * others' work stands on stays, under ERASED_NAME: readings they shared, keys, remarks in threads, and work that was
 * handed in with its marks (the course's results would not add up without it; nothing tells any more whose it was).
 */
export async function erasePerson(deps: Deps, person: { readonly userId: string; readonly email: string }): Promise<void> {
  await eraseIdentity(deps, person);
  await eraseUnseenWork(deps, person.userId);
  await deps.db
    .update(users)
    .set({
      name: ERASED_NAME,
      email: `${person.userId}@erased.invalid`,
      passwordHash: null,
      emailVerifiedAt: null,
      preferences: {},
      deletedAt: deps.now(),
      sessionEpoch: sql`${users.sessionEpoch} + 1`,
    })
    .where(eq(users.id, person.userId));
}

async function eraseIdentity(deps: Deps, { userId, email }: { readonly userId: string; readonly email: string }): Promise<void> {
  await deps.db.delete(outbox).where(eq(outbox.toAddress, email));
  await deps.db.delete(invitations).where(eq(invitations.email, email));
  await deps.db.delete(accounts).where(eq(accounts.userId, userId));
  await deps.db.delete(signInLinks).where(eq(signInLinks.userId, userId));
  await deps.db.delete(courseMembers).where(eq(courseMembers.userId, userId));
  await deps.db.delete(handoutPrints).where(eq(handoutPrints.requestedBy, userId));
  await deps.db.delete(departmentMembers).where(eq(departmentMembers.userId, userId));
}

async function eraseUnseenWork(deps: Deps, userId: string): Promise<void> {
  const unfinished = and(eq(submissions.studentId, userId), eq(submissions.state, 'working'));
  const begun = await deps.db.select({ readingId: submissions.readingId }).from(submissions).where(unfinished);
  await deps.db.delete(submissions).where(unfinished);
  const readingIds = begun.map(({ readingId }) => readingId);
  if (readingIds.length > 0) await deps.db.delete(readings).where(inArray(readings.id, readingIds));
  const keys = deps.db.select({ id: assignments.keyReadingId }).from(assignments);
  await deps.db
    .delete(readings)
    .where(
      and(
        eq(readings.ownerId, userId),
        eq(readings.kind, 'person'),
        eq(readings.shared, 'private'),
        notInArray(readings.id, keys),
      ),
    );
}
