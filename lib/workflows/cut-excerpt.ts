import { noteAudit } from '@/db/queries/audit';
import { insertExcerpt } from '@/db/queries/excerpts';
import { insertReading } from '@/db/queries/reading-rows';
import { findScore } from '@/db/queries/scores';
import type { ScoreBar } from '@/db/schema/scores';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { enqueue } from '@/lib/jobs/queue';
import { type Result, err, ok } from '@/lib/result';
import { type Deps, inTransaction } from './deps';
import type { CutExcerptInput } from './library-input';

export interface CutExcerpt {
  readonly scoreId: string;
  readonly excerptId: string;
}

interface Span {
  readonly startTick: number;
  readonly endTick: number;
}

/** Ticks of a bar range, both ends included; or what is wrong with it. */
function spanOf(bars: readonly ScoreBar[], firstBar: number, lastBar: number): Result<Span, AppError> {
  const first = bars[firstBar];
  const last = bars[lastBar];
  if (!first) return err(appError('bad_input', undefined, { firstBar: 'The score has no such bar.' }));
  if (!last) return err(appError('bad_input', undefined, { lastBar: 'The score has no such bar.' }));
  if (lastBar < firstBar) return err(appError('bad_input', undefined, { lastBar: 'The last bar comes before the first.' }));
  return ok({ startTick: first.start, endTick: last.start + last.length });
}

/** Cuts a bar range out of a score, and queues the engine's proposal for it. */
export async function cutExcerpt(deps: Deps, actor: Actor, input: CutExcerptInput): Promise<Result<CutExcerpt, AppError>> {
  const score = await findScore(deps.db, actor, input.scoreId);
  if (!score) return err(appError('not_found'));
  if (score.state !== 'ready' || !score.bars) return err(appError('not_ready'));
  const span = spanOf(score.bars, input.firstBar, input.lastBar);
  if (!span.ok) return span;
  return ok({ scoreId: score.id, excerptId: await addExcerpt(deps, actor, input, span.value) });
}

function addExcerpt(deps: Deps, actor: Actor, input: CutExcerptInput, span: Span): Promise<string> {
  return inTransaction(deps, async (inside) => {
    const excerptId = inside.newId();
    await insertExcerpt(inside.db, actor, { id: excerptId, ...input, ...span });
    await queueProposal(inside, actor, excerptId, span);
    await noteAudit(inside, actor, { verb: 'cut', subjectKind: 'excerpt', subjectId: excerptId });
    return excerptId;
  });
}

/** An engine's reading that is still empty, and the job that fills it. */
export async function queueProposal(deps: Deps, actor: Actor, excerptId: string, span: Span): Promise<string> {
  const readingId = deps.newId();
  await insertReading(deps.db, {
    id: readingId,
    excerptId,
    departmentId: actor.departmentId,
    ownerId: null,
    kind: 'engine',
    title: 'Proposal',
    state: 'proposing',
    ...span,
  });
  await enqueue(deps.db, 'propose_reading', { readingId }, { id: deps.newId(), now: deps.now() });
  return readingId;
}
