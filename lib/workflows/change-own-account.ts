import { eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { getMemberships, getOwnAccount } from '@/db/queries/users';
import { noteAudit } from '@/db/queries/audit';
import { signInLinks, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { nameInput } from '@/lib/auth/email';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';

export const changeNameInput = z.object({ name: nameInput });

export async function changeName(deps: Deps, actor: Actor, input: z.output<typeof changeNameInput>): Promise<Result<{ readonly name: string }, AppError>> {
  await deps.db.update(users).set({ name: input.name }).where(eq(users.id, actor.userId));
  return ok({ name: input.name });
}

export const chooseDepartmentInput = z.object({ departmentId: z.uuid() });

/** For people of several departments: which one they work in from now on. */
export async function chooseDepartment(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof chooseDepartmentInput>,
): Promise<Result<null, AppError>> {
  const memberships = await getMemberships(deps.db, actor.userId);
  if (!memberships.some(({ departmentId }) => departmentId === input.departmentId)) return err(appError('not_found'));
  const { preferences } = await getOwnAccount(deps.db, actor);
  await deps.db
    .update(users)
    .set({ preferences: { ...preferences, departmentId: input.departmentId } })
    .where(eq(users.id, actor.userId));
  return ok(null);
}

export const chooseRemarkMailInput = z.object({ remarkMail: z.boolean() });

/** Switches the mails about remarks on or off. */
export async function chooseRemarkMail(
  deps: Deps,
  actor: Actor,
  { remarkMail }: z.output<typeof chooseRemarkMailInput>,
): Promise<Result<null, AppError>> {
  const { preferences } = await getOwnAccount(deps.db, actor);
  await deps.db.update(users).set({ preferences: { ...preferences, remarkMail } }).where(eq(users.id, actor.userId));
  return ok(null);
}

export const signOutEverywhereInput = z.object({});

/** Ends every session of the person on every device, and the links that are still on their way. */
export async function signOutEverywhere(deps: Deps, actor: Actor): Promise<Result<null, AppError>> {
  await inTransaction(deps, async (deps) => {
    await deps.db
      .update(users)
      .set({ sessionEpoch: sql`${users.sessionEpoch} + 1` })
      .where(eq(users.id, actor.userId));
    await deps.db.delete(signInLinks).where(eq(signInLinks.userId, actor.userId));
    await noteAudit(deps, actor, { verb: 'account.sign_out_everywhere', subjectKind: 'user', subjectId: actor.userId });
  });
  return ok(null);
}
