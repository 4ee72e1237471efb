import { unsafeFailPrint, unsafeFindQueuedPrint, unsafeSavePrint } from '@/db/queries/handout-prints';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { askedLabels } from '@/lib/handout/print-options';
import { engraveInThread } from '@/lib/jobs/engrave';
import type { EngravedHandout } from '@/lib/jobs/engrave-thread';
import { sha256Of } from '@/lib/storage/object-store';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { Deps } from './deps';
import { readingOf } from './stored-reading';

type QueuedPrint = NonNullable<Awaited<ReturnType<typeof unsafeFindQueuedPrint>>>;

/** The job of an ordered print: pages and PDF into the store, and the row made ready. */
export async function engravePrint(deps: Deps, { printId }: { printId: string }): Promise<void> {
  const print = await unsafeFindQueuedPrint(deps.db, printId);
  if (!print) return;
  const bytes = await deps.storage.get(print.scoreSha256);
  if (!bytes) return unsafeFailPrint(deps.db, printId, 'The score’s file is not in the store.');
  const engraved = await engraveInThread(await taskOf(deps, print, bytes));
  if (!engraved.ok) return unsafeFailPrint(deps.db, printId, engraved.error.message.slice(0, 300));
  await savePrint(deps, printId, engraved.value);
}

async function taskOf(deps: Deps, print: QueuedPrint, bytes: Uint8Array) {
  const { options, firstBar, lastBar, startTick, endTick } = print;
  const reading = readingOf(await unsafeLoadReadingContent(deps.db, { id: print.readingId, startTick, endTick }));
  const { asked: _asked, chosen: _chosen, ...chosen } = options;
  const order = {
    ...chosen,
    conventions: print.conventions ?? DEFAULT_CONVENTIONS,
    firstBar,
    lastBar,
    reading,
    asked: askedLabels(reading.labels, options),
  };
  return { bytes, order, createdAt: print.createdAt, author: '' };
}

async function savePrint(deps: Deps, printId: string, { document, pdf }: EngravedHandout): Promise<void> {
  const pages = new TextEncoder().encode(JSON.stringify(document.pages));
  const [pagesSha256, pdfSha256] = [sha256Of(pages), sha256Of(pdf)];
  await deps.storage.put(pagesSha256, pages, 'application/json');
  await deps.storage.put(pdfSha256, pdf, 'application/pdf');
  await unsafeSavePrint(deps.db, printId, { pageCount: document.pages.length, pagesSha256, pdfSha256 });
}

/** After the last try. */
export async function giveUpPrint(deps: Deps, { printId }: { printId: string }): Promise<void> {
  await unsafeFailPrint(deps.db, printId, 'This handout could not be engraved. It was logged; try other bars or another size.');
}
