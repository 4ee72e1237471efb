/**
 * The thread's side of in-thread.ts: reading a large score, and hearing its harmony, takes seconds of pure calculation,
 * during which the worker could renew no lease and send no mail. It may be killed at any moment.
 */
import { parentPort, workerData } from 'node:worker_threads';
import { proposeReading } from '@/lib/harmony/propose';
import { ok } from '@/lib/result';
import { readScore } from '@/lib/score/read-score';
import { ticks } from '@/lib/score/score';
import type { ThreadAnswer, ThreadTask } from './in-thread';
import { factsOf } from './score-facts';

function answer(task: ThreadTask): ThreadAnswer {
  const score = readScore(task.bytes);
  if (!score.ok) return score;
  if (!task.span) return ok({ facts: factsOf(score.value), reading: null });
  const reading = proposeReading(score.value, { start: ticks(task.span.start), end: ticks(task.span.end) });
  return ok({ facts: null, reading });
}

parentPort?.postMessage('started');
parentPort?.postMessage(answer(workerData as ThreadTask));
