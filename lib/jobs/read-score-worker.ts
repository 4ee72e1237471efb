import { Worker } from 'node:worker_threads';
import { type Result, err } from '@/lib/result';
import type { Score, ScoreError } from '@/lib/score/score';

export interface ReadingBounds {
  /** Time for the reading itself; starting the thread is not counted. */
  readonly milliseconds: number;
  /** Heap of the thread. */
  readonly megabytes: number;
}

const DEFAULT_BOUNDS: ReadingBounds = { milliseconds: 5_000, megabytes: 512 };
/** A thread that does not even start in this time is a fault of ours. */
const START_MILLISECONDS = 30_000;

/**
 * Reads a score in a thread that is killed when it takes too long or too much memory: refused as `timed_out` or
 * `out_of_memory`. Rejects only on a bug in the reader, with it as the cause.
 */
export function readScoreInWorker(bytes: Uint8Array, bounds: ReadingBounds = DEFAULT_BOUNDS): Promise<Result<Score, ScoreError>> {
  const worker = startThread(bytes, bounds);
  return new Promise((resolve, reject) => {
    const giveUp = (error: ScoreError) => settle(() => resolve(err(error)));
    let timer = setTimeout(() => settle(() => reject(new Error('the reading thread did not start'))), START_MILLISECONDS);
    const settle = (answer: () => void) => {
      clearTimeout(timer);
      void worker.terminate();
      answer();
    };
    worker.on('message', (message: 'started' | Result<Score, ScoreError>) => {
      if (message !== 'started') return settle(() => resolve(message));
      clearTimeout(timer);
      timer = setTimeout(() => giveUp(TIMED_OUT), bounds.milliseconds);
    });
    worker.on('error', (cause: Error & { code?: string }) => {
      if (cause.code === 'ERR_WORKER_OUT_OF_MEMORY') giveUp(OUT_OF_MEMORY);
      else settle(() => reject(new Error('the score reader failed', { cause })));
    });
    worker.on('exit', (code) => settle(() => reject(new Error(`the reading thread ended with ${code}`))));
  });
}

const TIMED_OUT: ScoreError = {
  code: 'timed_out',
  message: 'Reading this file takes too long; it is not like a usual score. Split it, or export it again.',
};
const OUT_OF_MEMORY: ScoreError = {
  code: 'out_of_memory',
  message: 'Reading this file takes too much memory; it is not like a usual score. Split it, or export it again.',
};

/** The thread is TypeScript like everything else, so tsx is registered in it first. */
function startThread(bytes: Uint8Array, { megabytes }: ReadingBounds): Worker {
  const here = JSON.stringify(import.meta.url);
  const start = `const from = require('node:module').createRequire(${here}); from('tsx/cjs'); from('./read-score-thread.ts');`;
  return new Worker(start, {
    eval: true,
    workerData: bytes,
    execArgv: [],
    resourceLimits: { maxOldGenerationSizeMb: megabytes },
  });
}
