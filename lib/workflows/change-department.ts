import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { getDepartment } from '@/db/queries/members';
import { departments } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { nameInput } from '@/lib/auth/email';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { PAPERS } from '@/lib/vocabularies';
import { type Deps, inTransaction } from './deps';

export const changeDepartmentInput = z.object({ name: nameInput, paper: z.enum(PAPERS) });

/** The owner's settings: what the department is called, and what its handouts are printed on. */
export async function changeDepartment(
  deps: Deps,
  actor: Actor,
  input: z.output<typeof changeDepartmentInput>,
): Promise<Result<null, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  return inTransaction(deps, async (deps) => {
    const { settings } = await getDepartment(deps.db, actor);
    await deps.db
      .update(departments)
      .set({ name: input.name, settings: { ...settings, paper: input.paper } })
      .where(eq(departments.id, actor.departmentId));
    const details = { paper: input.paper };
    await noteAudit(deps, actor, { verb: 'department.change', subjectKind: 'department', subjectId: actor.departmentId, details });
    return ok(null);
  });
}
