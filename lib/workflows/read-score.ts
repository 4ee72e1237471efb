import { unsafeFailProposals, unsafeListProposing } from '@/db/queries/proposals';
import { unsafeFindScoreFile, unsafeSaveReadScore, unsafeSaveRefusal, unsafeSetScoreState } from '@/db/queries/scores';
import { readInThread } from '@/lib/jobs/in-thread';
import { enqueue } from '@/lib/jobs/queue';
import type { ScoreFacts } from '@/lib/jobs/score-facts';
import { type Deps, inTransaction } from './deps';
import { titleOfFile } from './upload-score';

type ScoreFile = NonNullable<Awaited<ReturnType<typeof unsafeFindScoreFile>>>;
type Refusal = Parameters<typeof unsafeSaveRefusal>[2];

const TITLE_LENGTH = 300;

const GONE: Refusal = { code: 'file_missing', message: 'The file is no longer in the store. Upload it again.' };
const GIVEN_UP: Refusal = {
  code: 'not_read',
  message: 'Reading this file failed on our side, several times. The file is kept; try again later, or export it anew.',
};

/** The reader ran into a bound that a busy machine may be to blame for: worth another try. */
class ReadingStopped extends Error {
  override readonly name = 'ReadingStopped';

  constructor(readonly refusal: Refusal) {
    super(refusal.code);
  }
}

/** The job of an uploaded score: its file is read, and the row says what is in it or why it was refused. */
export async function readStoredScore(deps: Deps, { scoreId }: { scoreId: string }): Promise<void> {
  const file = await unsafeFindScoreFile(deps.db, scoreId);
  if (!file || file.state === 'ready' || file.state === 'refused') return;
  await unsafeSetScoreState(deps.db, scoreId, 'reading');
  const outcome = await readFile(deps, file);
  if ('code' in outcome) return refuseScore(deps, scoreId, outcome);
  await saveScore(deps, file, outcome);
}

/** After the last try. */
export async function giveUpScore(deps: Deps, { scoreId }: { scoreId: string }, thrown: unknown): Promise<void> {
  const file = await unsafeFindScoreFile(deps.db, scoreId);
  if (!file || file.state === 'ready') return;
  await refuseScore(deps, scoreId, thrown instanceof ReadingStopped ? thrown.refusal : GIVEN_UP);
}

async function readFile(deps: Deps, file: ScoreFile): Promise<ScoreFacts | Refusal> {
  const bytes = await deps.storage.get(file.sha256);
  if (!bytes) return GONE;
  const read = await readInThread(bytes);
  if (read.ok) return read.value;
  if (read.error.code === 'timed_out') throw new ReadingStopped(read.error);
  return read.error;
}

/** The file's own words fill what its uploader left empty; a title taken from the file's name gives way to the file's own. */
function wordsOf(file: ScoreFile, facts: ScoreFacts) {
  const isTyped = file.title !== '' && file.title !== titleOfFile(file.fileName);
  return {
    title: (isTyped ? file.title : facts.title || file.title).slice(0, TITLE_LENGTH),
    composer: (file.composer || facts.composer).slice(0, TITLE_LENGTH),
    work: (file.work || facts.work).slice(0, TITLE_LENGTH),
  };
}

async function saveScore(deps: Deps, file: ScoreFile, facts: ScoreFacts): Promise<void> {
  await inTransaction(deps, async (inside) => {
    await unsafeSaveReadScore(inside.db, file.id, { ...facts, ...wordsOf(file, facts) });
    for (const readingId of await unsafeListProposing(inside.db, file.id)) {
      await enqueue(inside.db, 'propose_reading', { readingId }, { id: inside.newId(), now: inside.now() });
    }
  });
}

async function refuseScore(deps: Deps, scoreId: string, refusal: Refusal): Promise<void> {
  await inTransaction(deps, async ({ db }) => {
    await unsafeSaveRefusal(db, scoreId, refusal);
    await unsafeFailProposals(db, await unsafeListProposing(db, scoreId));
  });
}
