import { z } from 'zod';
import { isDuplicate } from '@/db/client';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { type ReadingHead, findAnswerFrame, findReading, lockReading } from '@/db/queries/readings';
import {
  advanceReading,
  findRevisionVersion,
  insertRevision,
  listAttachedRemarks,
  reattachRemarks,
  storeChange,
} from '@/db/queries/revisions';
import type { Actor } from '@/lib/auth/actor';
import { canEditReading } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { checkAnswer } from '@/lib/harmony/answers';
import { type Change, applyChange } from '@/lib/harmony/edit';
import type { Reading } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import { changeInput } from './change-input';
import { type Deps, inTransaction } from './deps';
import { type ReadingNews, listNews } from './read-reading';
import { readingOf } from './stored-reading';

export const editReadingInput = z.object({
  readingId: z.uuid(),
  /** Made once by the desk; sent again, the edit is not done again. */
  editId: z.uuid(),
  /** The version the desk knows: the answer tells what was saved since. */
  baseVersion: z.int().min(0),
  words: z.string().max(200),
  change: changeInput,
});
export type EditReadingInput = z.infer<typeof editReadingInput>;

/**
 * Makes one edit of a reading: one transaction under the reading's lock, with a revision of both sides. Edits of different
 * labels go together whatever version they were made on; an edit of a label that has changed meanwhile is a version
 * conflict and changes nothing. The answer lists every edit since `baseVersion`, this one included.
 */
export async function editReading(deps: Deps, actor: Actor, input: EditReadingInput): Promise<Result<ReadingNews, AppError>> {
  try {
    return await inTransaction(deps, (inside) => editLocked(inside, actor, input));
  } catch (error) {
    // An id that some other reading's label or edit bears already.
    if (isDuplicate(error)) return err(appError('bad_input', 'This edit does not fit this reading.'));
    throw error;
  }
}

async function editLocked(deps: Deps, actor: Actor, input: EditReadingInput): Promise<Result<ReadingNews, AppError>> {
  if (!(await lockReading(deps.db, actor, input.readingId))) return err(appError('not_found'));
  const reading = await findReading(deps.db, actor, input.readingId, deps.now());
  if (!reading) return err(appError('not_found'));
  if ((await findRevisionVersion(deps.db, reading.id, input.editId)) !== null) return ok(await listNews(deps, reading, input.baseVersion));
  if (!canEditReading(actor, reading.access)) return err(refusalOf(actor, reading));
  return makeEdit(deps, actor, reading, input);
}

/** Who may see a reading but not edit it is told that it is closed; everyone else that there is nothing. */
function refusalOf(actor: Actor, reading: ReadingHead): AppError {
  const ownWork = reading.kind === 'submission' && reading.ownerId === actor.userId;
  return ownWork ? appError('submission_closed') : appError('not_found');
}

async function makeEdit(deps: Deps, actor: Actor, head: ReadingHead, input: EditReadingInput): Promise<Result<ReadingNews, AppError>> {
  // Whether a change fits does not depend on the engine's runners-up.
  const content = readingOf(await unsafeLoadReadingContent(deps.db, head, { alternatives: false }));
  const refusal = await checkFrame(deps, head, input.change);
  if (refusal) return err(refusal);
  const applied = applyChange(content, input.change);
  if (!applied.ok) return err(appError('version_conflict'));
  await store(deps, actor, head, input, applied.value);
  return ok(await listNews(deps, { ...head, version: head.version + 1 }, input.baseVersion));
}

async function checkFrame(deps: Deps, head: ReadingHead, change: Change): Promise<AppError | null> {
  if (head.kind !== 'submission') return null;
  const frame = await findAnswerFrame(deps.db, head.id);
  if (!frame) return appError('not_found');
  const [fault] = checkAnswer(change, { ...frame, spansGiven: frame.segmentation === 'given' });
  return fault ? appError('bad_input', fault) : null;
}

async function store(deps: Deps, actor: Actor, head: ReadingHead, input: EditReadingInput, after: Reading): Promise<void> {
  const { labels, regions } = input.change;
  const gone = labels.before.filter((b) => !labels.after.some((a) => a.id === b.id)).map((l) => l.id);
  const come = labels.after.filter((a) => !labels.before.some((b) => b.id === a.id)).map((l) => l.id);
  const sides = {
    before: { labels: labels.before, regions: regions.before, remarks: await listAttachedRemarks(deps.db, gone) },
    after: { labels: labels.after, regions: regions.after, words: input.words },
  };
  await storeChange(deps.db, head.id, sides.before, sides.after);
  await reattachRemarks(deps.db, head.id, come);
  const version = head.version + 1;
  await insertRevision(deps.db, { editId: input.editId, readingId: head.id, version, authorId: actor.userId, ...sides, createdAt: deps.now() });
  const advanced = await advanceReading(deps.db, head.id, head.version, isSettled(after) ? 'settled' : 'open');
  if (!advanced) throw new Error('the reading moved on under its lock');
}

function isSettled(reading: Reading): boolean {
  return reading.labels.every((label) => label.numeral !== null && label.state !== 'suggested');
}
