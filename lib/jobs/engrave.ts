import path from 'node:path';
import { Piscina } from 'piscina';
import { type Result, err } from '@/lib/result';
import type { ScoreError } from '@/lib/score/score';
import type { EngravedHandout, EngravingTask } from './engrave-thread';

/** A long excerpt takes some seconds; what takes longer is killed with its thread. */
const MILLISECONDS = 120_000;
const MEGABYTES = 1_024;
/** The thread is let go when no handout was asked for in this time. */
const IDLE_MILLISECONDS = 10 * 60_000;

let pool: Piscina | null = null;

/** One thread, started at the first handout. Its code is TypeScript, in production too. */
function getPool(): Piscina {
  pool ??= new Piscina({
    filename: path.join(process.cwd(), 'lib/jobs/engrave-thread.ts'),
    execArgv: ['--require', 'tsx/cjs'],
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: IDLE_MILLISECONDS,
    resourceLimits: { maxOldGenerationSizeMb: MEGABYTES },
  });
  return pool;
}

const TIMED_OUT: ScoreError = { code: 'timed_out', message: 'Engraving this excerpt takes too long. Choose fewer bars.' };

/** Engraves in a thread of its own. Rejects on a bug in the engraving; a file that cannot be read is a refusal. */
export async function engraveInThread(task: EngravingTask): Promise<Result<EngravedHandout, ScoreError>> {
  const signal = AbortSignal.timeout(MILLISECONDS);
  try {
    return (await getPool().run(task, { signal })) as Result<EngravedHandout, ScoreError>;
  } catch (error) {
    if (signal.aborted) return err(TIMED_OUT);
    throw error;
  }
}
