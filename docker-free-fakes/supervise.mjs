/** Keeps one process running: when it ends by itself it is started again, each time later if it ends soon. */
import { setTimeout as sleep } from 'node:timers/promises';
import { exitOf, stopOwned } from './processes.mjs';
import { say } from './steps.mjs';

const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 30_000;
const SETTLED_AFTER_MS = 60_000;

/** Tries again, ever later, until it starts or the run stops. */
async function startAgain(name, start, firstWait, isStopping) {
  for (let wait = firstWait; !isStopping(); wait = Math.min(wait * 2, LONGEST_WAIT_MS)) {
    await sleep(wait);
    if (isStopping()) break;
    try {
      return { child: await start(), wait: Math.min(wait * 2, LONGEST_WAIT_MS) };
    } catch (error) {
      say(`  ! ${name}: ${error.message}`);
    }
  }
  return undefined;
}

/**
 * Starts the process; rejects when the first start fails.
 * @param {() => import('node:child_process').ChildProcess | Promise<import('node:child_process').ChildProcess>} start
 */
export async function supervise(name, start) {
  let stopping = false;
  let child = await start();
  const watch = async () => {
    for (let wait = FIRST_WAIT_MS; ; ) {
      const from = Date.now();
      const code = await exitOf(child);
      if (stopping) return;
      if (Date.now() - from > SETTLED_AFTER_MS) wait = FIRST_WAIT_MS;
      say(`  ! ${name} ended (exit ${code}); starting it again in ${wait / 1000} s`);
      const next = await startAgain(name, start, wait, () => stopping);
      if (!next) return;
      ({ child, wait } = next);
      if (stopping) return void (await stopOwned(child));
    }
  };
  void watch();
  return {
    stop: () => {
      stopping = true;
      return stopOwned(child);
    },
  };
}
