import { noteAudit } from '@/db/queries/audit';
import { countAssignmentsOfExcerpt, findDeletedExcerpt, findExcerpt, listReadingsOfExcerpts, setExcerptDeleted, updateExcerptWords } from '@/db/queries/excerpts';
import type { Actor } from '@/lib/auth/actor';
import { canChangeLibraryItem } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { queueProposal } from './cut-excerpt';
import { type Deps, inTransaction } from './deps';
import type { ChangeExcerptInput, ExcerptInput } from './library-input';

interface Changed {
  readonly excerptId: string;
  readonly scoreId: string;
}

async function findChangeable(deps: Deps, actor: Actor, excerptId: string) {
  const excerpt = await findExcerpt(deps.db, actor, excerptId);
  return excerpt && canChangeLibraryItem(actor, { broughtBy: excerpt.createdBy }) ? excerpt : null;
}

/** Title and purpose. The bars stay: readings lie on them; cut another excerpt instead. */
export async function changeExcerpt(deps: Deps, actor: Actor, { excerptId, ...words }: ChangeExcerptInput): Promise<Result<Changed, AppError>> {
  const excerpt = await findChangeable(deps, actor, excerptId);
  if (!excerpt) return err(appError('not_found'));
  await updateExcerptWords(deps.db, actor, excerptId, words);
  return ok({ excerptId, scoreId: excerpt.scoreId });
}

/** Takes an excerpt, with its readings, out of the library; it can be brought back. One that is assigned stays. */
export async function deleteExcerpt(deps: Deps, actor: Actor, { excerptId }: ExcerptInput): Promise<Result<Changed, AppError>> {
  const excerpt = await findChangeable(deps, actor, excerptId);
  if (!excerpt) return err(appError('not_found'));
  const assigned = await countAssignmentsOfExcerpt(deps.db, actor, excerptId);
  if (assigned > 0) {
    return err(appError('in_use', `This excerpt stays: ${assigned === 1 ? 'an assignment uses it' : `${assigned} assignments use it`}.`));
  }
  await inTransaction(deps, async (inside) => {
    await setExcerptDeleted(inside.db, actor, excerptId, inside.now());
    await noteAudit(inside, actor, { verb: 'delete', subjectKind: 'excerpt', subjectId: excerptId });
  });
  return ok({ excerptId, scoreId: excerpt.scoreId });
}

/** Undoes deleteExcerpt. */
export async function restoreExcerpt(deps: Deps, actor: Actor, { excerptId }: ExcerptInput): Promise<Result<Changed, AppError>> {
  const deleted = await findDeletedExcerpt(deps.db, actor, excerptId);
  if (!deleted || !canChangeLibraryItem(actor, { broughtBy: deleted.createdBy })) return err(appError('not_found'));
  await inTransaction(deps, async (inside) => {
    await setExcerptDeleted(inside.db, actor, excerptId, null);
    await noteAudit(inside, actor, { verb: 'restore', subjectKind: 'excerpt', subjectId: excerptId });
  });
  return ok({ excerptId, scoreId: deleted.scoreId });
}

/** Asks the engine again when its proposal failed or there is none. */
export async function proposeAgain(deps: Deps, actor: Actor, { excerptId }: ExcerptInput): Promise<Result<Changed, AppError>> {
  const excerpt = await findExcerpt(deps.db, actor, excerptId);
  if (!excerpt) return err(appError('not_found'));
  const readings = await listReadingsOfExcerpts(deps.db, actor, [excerptId]);
  const alive = readings.some((reading) => reading.kind === 'engine' && reading.state !== 'failed');
  if (alive) return err(appError('already_there', 'There is a proposal for this excerpt.'));
  await inTransaction(deps, async (inside) => {
    await queueProposal(inside, actor, excerptId, excerpt);
  });
  return ok({ excerptId, scoreId: excerpt.scoreId });
}
