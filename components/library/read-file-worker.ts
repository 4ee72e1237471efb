/** Reads a chosen file off the page's thread, so that typing goes on; read-file.ts starts it and may end it. */
import { readScore } from '@/lib/score/read-score';
import type { FileFacts } from './read-file';

self.addEventListener('message', (event: MessageEvent<ArrayBuffer>) => {
  const score = readScore(new Uint8Array(event.data));
  const facts: FileFacts = score.ok
    ? { ok: true, title: score.value.title, composer: score.value.composer, work: score.value.work, bars: score.value.bars.length }
    : { ok: false, message: score.error.message, line: score.error.line ?? null, element: score.error.element ?? null };
  self.postMessage(facts);
});

self.postMessage('started');
