import { unsafeFailProposals, unsafeFindProposing, unsafeSaveProposal } from '@/db/queries/proposals';
import { proposeInThread } from '@/lib/jobs/in-thread';
import type { Deps } from './deps';

/** The job of a reading that waits for the engine: its labels and key regions are filled in, all as suggestions. */
export async function proposeStoredReading(deps: Deps, { readingId }: { readingId: string }): Promise<void> {
  const waiting = await unsafeFindProposing(deps.db, readingId);
  // Not read yet: the job that reads the score queues this one again.
  if (!waiting || waiting.scoreState === 'queued' || waiting.scoreState === 'reading') return;
  const bytes = waiting.scoreState === 'ready' ? await deps.storage.get(waiting.sha256) : null;
  const span = { start: waiting.startTick, end: waiting.endTick };
  const proposed = bytes ? await proposeInThread(bytes, span) : null;
  if (!proposed?.ok) return unsafeFailProposals(deps.db, [readingId]);
  // The engine's label ids are unique within a reading only; rows need ids of their own.
  const labels = proposed.value.labels.map((label) => ({ ...label, id: deps.newId() }));
  await unsafeSaveProposal(deps.db, readingId, { ...proposed.value, labels });
}

/** After the last try. */
export async function giveUpProposal(deps: Deps, { readingId }: { readingId: string }): Promise<void> {
  await unsafeFailProposals(deps.db, [readingId]);
}
