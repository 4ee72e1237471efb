import { noteAudit } from '@/db/queries/audit';
import { countExcerpts, findDeletedScore, findScore, findScoreOfFile, setScoreDeleted, unsafeSetScoreState, updateScoreFacts } from '@/db/queries/scores';
import type { Actor } from '@/lib/auth/actor';
import { canChangeLibraryItem } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { enqueue } from '@/lib/jobs/queue';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';
import type { ChangeScoreInput, ScoreInput } from './library-input';

interface Changed {
  readonly scoreId: string;
}

async function findChangeable(deps: Deps, actor: Actor, scoreId: string) {
  const score = await findScore(deps.db, actor, scoreId);
  return score && canChangeLibraryItem(actor, { broughtBy: score.uploadedBy }) ? score : null;
}

/** Title, composer, work, source and rights. */
export async function changeScore(deps: Deps, actor: Actor, { scoreId, ...words }: ChangeScoreInput): Promise<Result<Changed, AppError>> {
  if (!(await findChangeable(deps, actor, scoreId))) return err(appError('not_found'));
  await updateScoreFacts(deps.db, actor, scoreId, words);
  return ok({ scoreId });
}

/** Takes a score out of the library; it can be brought back. A score that excerpts were cut from stays. */
export async function deleteScore(deps: Deps, actor: Actor, { scoreId }: ScoreInput): Promise<Result<Changed, AppError>> {
  if (!(await findChangeable(deps, actor, scoreId))) return err(appError('not_found'));
  const excerpts = await countExcerpts(deps.db, actor, scoreId);
  if (excerpts > 0) return err(appError('in_use', inUseSentence(excerpts)));
  await inTransaction(deps, async (inside) => {
    await setScoreDeleted(inside.db, actor, scoreId, inside.now());
    await noteAudit(inside, actor, { verb: 'delete', subjectKind: 'score', subjectId: scoreId });
  });
  return ok({ scoreId });
}

function inUseSentence(excerpts: number): string {
  const cut = excerpts === 1 ? 'One excerpt was cut from it' : `${excerpts} excerpts were cut from it`;
  return `This score stays: ${cut}. Delete ${excerpts === 1 ? 'that' : 'those'} first.`;
}

/** Undoes deleteScore. */
export async function restoreScore(deps: Deps, actor: Actor, { scoreId }: ScoreInput): Promise<Result<Changed, AppError>> {
  const deleted = await findDeletedScore(deps.db, actor, scoreId);
  if (!deleted || !canChangeLibraryItem(actor, { broughtBy: deleted.uploadedBy })) return err(appError('not_found'));
  if (await findScoreOfFile(deps.db, actor, deleted.sha256)) {
    return err(appError('already_there', 'The same file was uploaded again meanwhile; that score is in the library.'));
  }
  await inTransaction(deps, async (inside) => {
    await setScoreDeleted(inside.db, actor, scoreId, null);
    await noteAudit(inside, actor, { verb: 'restore', subjectKind: 'score', subjectId: scoreId });
  });
  return ok({ scoreId });
}

/** Has a refused score read again, for instance after the reader has learnt something. */
export async function readScoreAgain(deps: Deps, actor: Actor, { scoreId }: ScoreInput): Promise<Result<Changed, AppError>> {
  const score = await findScore(deps.db, actor, scoreId);
  if (!score || score.state !== 'refused') return err(appError('not_found'));
  await inTransaction(deps, async (inside) => {
    await unsafeSetScoreState(inside.db, scoreId, 'queued');
    await enqueue(inside.db, 'read_score', { scoreId }, { id: inside.newId(), now: inside.now() });
  });
  return ok({ scoreId });
}
