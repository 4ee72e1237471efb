import { eq } from 'drizzle-orm';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { findReading } from '@/db/queries/readings';
import { readings } from '@/db/schema';
import { acceptLabels } from '@/lib/harmony/edit';
import type { Sharing } from '@/lib/vocabularies';
import type { Deps } from '@/lib/workflows/deps';
import { editReading } from '@/lib/workflows/edit-reading';
import { startReading } from '@/lib/workflows/start-reading';
import { readingOf } from '@/lib/workflows/stored-reading';
import { actorOf, must } from './actors';
import type { SeededExcerpt } from './library';

/** A reading that starts from the engine's labels, all still suggested. */
export async function startOwn(deps: Deps, mailbox: string, excerpt: SeededExcerpt): Promise<string> {
  return must(await startReading(deps, actorOf(mailbox), { excerptId: excerpt.excerptId })).readingId;
}

/** Accepts the first `share` of a reading's labels: work that was begun and left. */
export async function acceptSome(deps: Deps, mailbox: string, readingId: string, share: number): Promise<void> {
  const actor = actorOf(mailbox);
  const head = await findReading(deps.db, actor, readingId, deps.now());
  if (!head) throw new Error('the reading is gone');
  const reading = readingOf(await unsafeLoadReadingContent(deps.db, head));
  const chosen = reading.labels.slice(0, Math.round(reading.labels.length * share)).map(({ id }) => id);
  const accepted = acceptLabels(reading, chosen);
  if (!accepted.ok) throw new Error('the labels cannot be accepted', { cause: accepted.error });
  const edit = { readingId, editId: deps.newId(), baseVersion: head.version, words: `accept ${chosen.length} labels`, change: accepted.value.change };
  must(await editReading(deps, actor, edit));
}

export async function shareReading(deps: Deps, readingId: string, shared: Sharing): Promise<void> {
  await deps.db.update(readings).set({ shared }).where(eq(readings.id, readingId));
}
