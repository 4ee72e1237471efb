import { deleteEndedJobs, deleteHeartbeat, deleteHeartbeatsBefore, returnJobs, saveHeartbeat } from '@/db/queries/jobs';
import { deleteSentMails } from '@/db/queries/outbox-delivery';
import { describeError } from '@/lib/log';
import type { Mailer } from '@/lib/mail/mailer';
import type { Deps } from '@/lib/workflows/deps';
import { HEARTBEAT_EVERY_MS } from './heartbeat';
import { pause, repeat } from './pause';
import { type JobHandlers, type WorkerContext, runNextJob } from './run-job';
import { sendDueMails } from './send-mails';

const POLL_EVERY_MS = 400;
const TIDY_EVERY_MS = 3_600_000;
const KEEP_ENDED_MS = 14 * 24 * 3_600_000;
/** How long a stopping worker lets its jobs finish before it puts them back. */
const FINISH_WITHIN_MS = 10_000;

export interface WorkerOptions {
  readonly id: string;
  readonly deps: Deps;
  readonly mailer: Mailer;
  readonly handlers: JobHandlers;
  /** Jobs done at the same time. */
  readonly slots: number;
  /** Stops the worker: it takes nothing new, finishes or puts back what it has, and the promise resolves. */
  readonly signal: AbortSignal;
}

/** Does jobs and sends mails until it is told to stop. Any number of workers may run on one database. */
export async function runWorker({ id, deps, mailer, handlers, slots, signal }: WorkerOptions): Promise<void> {
  const worker: WorkerContext = { id, deps, handlers, running: new Set() };
  const loop = (part: string, every: number, work: () => Promise<boolean>) =>
    repeat(work, {
      every,
      signal,
      onError: (error) => deps.log.error({ workerId: id, part, ...describeError(error) }, 'a loop of the worker failed'),
    });
  deps.log.info({ workerId: id, count: slots }, 'worker started');
  const jobLoops = Array.from({ length: slots }, () => loop('jobs', POLL_EVERY_MS, () => runNextJob(worker)));
  const others = [
    loop('heartbeat', HEARTBEAT_EVERY_MS, () => beat(worker)),
    loop('mail', POLL_EVERY_MS, () => sendDueMails({ ...deps, mailer }, id)),
    loop('tidy', TIDY_EVERY_MS, () => tidy(deps)),
  ];
  await Promise.all(others);
  await finishOrReturn(worker, Promise.all(jobLoops));
  deps.log.info({ workerId: id }, 'worker stopped');
}

async function beat({ deps, id }: WorkerContext): Promise<boolean> {
  await saveHeartbeat(deps.db, id, deps.now());
  return false;
}

async function tidy(deps: Deps): Promise<boolean> {
  const before = new Date(deps.now().getTime() - KEEP_ENDED_MS);
  await deleteEndedJobs(deps.db, before);
  await deleteSentMails(deps.db, before);
  await deleteHeartbeatsBefore(deps.db, before);
  return false;
}

/** Leaves nothing half-claimed: another worker must not have to wait for a lease to run out. */
async function finishOrReturn({ deps, id, running }: WorkerContext, jobLoops: Promise<unknown>): Promise<void> {
  const patience = new AbortController();
  await Promise.race([jobLoops, pause(FINISH_WITHIN_MS, patience.signal)]);
  patience.abort();
  try {
    await returnJobs(deps.db, [...running], id, deps.now());
    await deleteHeartbeat(deps.db, id);
  } catch (error) {
    deps.log.warn({ workerId: id, ...describeError(error) }, 'a stopping worker could not put its jobs back');
  }
}
