import { Worker } from 'node:worker_threads';
import type { Reading } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import type { ScoreError } from '@/lib/score/score';
import type { ScoreFacts } from './score-facts';

/** [start, end) in ticks of the score. */
export interface TickSpan {
  readonly start: number;
  readonly end: number;
}

/** Bytes of a file as it was uploaded; with a span, its proposal is asked for, else the score's facts. */
export interface ThreadTask {
  readonly bytes: Uint8Array;
  readonly span: TickSpan | null;
}

export type ThreadAnswer = Result<{ readonly facts: ScoreFacts | null; readonly reading: Reading | null }, ScoreError>;

export interface ThreadBounds {
  /** Time for the work itself; starting the thread is not counted. */
  readonly milliseconds: number;
  /** Heap of the thread. */
  readonly megabytes: number;
}

/** Several times what the largest score within the limits of lib/score takes (200,000 notes: about a second). */
export const READ_BOUNDS: ThreadBounds = { milliseconds: 5_000, megabytes: 512 };
/** Some ten times what the largest such score takes on a busy machine. */
const PROPOSE_BOUNDS: ThreadBounds = { milliseconds: 180_000, megabytes: 1_024 };
/** A thread that does not even start in this time is a fault of ours. */
const START_MILLISECONDS = 30_000;

const TIMED_OUT: ScoreError = {
  code: 'timed_out',
  message: 'Reading this file takes too long; it is not like a usual score. Split it, or export it again.',
};
const OUT_OF_MEMORY: ScoreError = {
  code: 'out_of_memory',
  message: 'Reading this file takes too much memory; it is not like a usual score. Split it, or export it again.',
};

/** What is in a file, or why it is refused: also as `timed_out` or `out_of_memory`. Rejects only on a bug in the reader. */
export async function readInThread(bytes: Uint8Array, bounds = READ_BOUNDS): Promise<Result<ScoreFacts, ScoreError>> {
  const answer = await askThread({ bytes, span: null }, bounds);
  return answer.ok ? ok(known(answer.value.facts)) : answer;
}

/** The engine's reading of a span of the file; refused and rejecting as `readInThread`. */
export async function proposeInThread(bytes: Uint8Array, span: TickSpan, bounds = PROPOSE_BOUNDS): Promise<Result<Reading, ScoreError>> {
  const answer = await askThread({ bytes, span }, bounds);
  return answer.ok ? ok(known(answer.value.reading)) : answer;
}

function known<T>(value: T | null): T {
  if (value === null) throw new Error('the thread answered another question');
  return value;
}

/** Does the task in a thread that is killed when it takes too long or too much memory. */
function askThread(task: ThreadTask, bounds: ThreadBounds): Promise<ThreadAnswer> {
  const thread = startThread(task, bounds);
  return new Promise<ThreadAnswer>((resolve, reject) => {
    let timer = setTimeout(() => reject(new Error('the thread did not start')), START_MILLISECONDS);
    thread.on('message', (message: 'started' | ThreadAnswer) => {
      clearTimeout(timer);
      if (message !== 'started') return resolve(message);
      timer = setTimeout(() => resolve(err(TIMED_OUT)), bounds.milliseconds);
    });
    thread.on('error', (cause: Error & { code?: string }) => {
      if (cause.code === 'ERR_WORKER_OUT_OF_MEMORY') resolve(err(OUT_OF_MEMORY));
      else reject(new Error('the thread failed', { cause }));
    });
    thread.on('exit', (code) => {
      clearTimeout(timer);
      reject(new Error(`the thread ended with ${code}`));
    });
  }).finally(() => void thread.terminate());
}

/** The thread's code is TypeScript, in production too (workers run from the sources): tsx is registered in it first. */
function startThread(task: ThreadTask, { megabytes }: ThreadBounds): Worker {
  const here = JSON.stringify(import.meta.url);
  const start = `const from = require('node:module').createRequire(${here}); from('tsx/cjs'); from('./score-thread.ts');`;
  return new Worker(start, {
    eval: true,
    workerData: task,
    execArgv: [],
    resourceLimits: { maxOldGenerationSizeMb: megabytes },
  });
}
