import { type ClaimedJob, buryJob, claimJobs, finishJob, renewLease, retryJob } from '@/db/queries/jobs';
import { describeError } from '@/lib/log';
import type { Deps } from '@/lib/workflows/deps';
import { JOB_PAYLOADS, type JobKind, type JobPayload, isJobKind } from './kinds';
import { formatFailure, retryAfter } from './retry';

/**
 * What a job does. It may run twice (a worker can die after the work and before it says so), so it must do no harm the
 * second time. A throw is a failure to be tried again; an outcome that will not change is written to its row instead.
 */
export interface JobHandler<P> {
  run(deps: Deps, payload: P): Promise<void>;
  /** After the last try, with what it threw: says so where people look for the outcome. */
  giveUp(deps: Deps, payload: P, thrown: unknown): Promise<void>;
}

export type JobHandlers = { readonly [K in JobKind]: JobHandler<JobPayload<K>> };

/** One worker among any number; `id` is unique to the process. */
export interface WorkerContext {
  readonly id: string;
  readonly deps: Deps;
  readonly handlers: JobHandlers;
  /** Jobs in hand. */
  readonly running: Set<string>;
}

const LEASE_MS = 60_000;

function leaseFrom(now: Date): Date {
  return new Date(now.getTime() + LEASE_MS);
}

/** Takes one due job and does it; false when none is due. */
export async function runNextJob(worker: WorkerContext): Promise<boolean> {
  const { deps } = worker;
  const claimant = { workerId: worker.id, kinds: Object.keys(worker.handlers) };
  const [job] = await claimJobs(deps.db, claimant, 1, deps.now(), leaseFrom(deps.now()));
  if (!job) return false;
  worker.running.add(job.id);
  const renewing = setInterval(() => void renewQuietly(worker, job), LEASE_MS / 3);
  try {
    await doJob(worker, job);
  } finally {
    clearInterval(renewing);
    worker.running.delete(job.id);
  }
  return true;
}

/** A renewal that fails is not the job's failure: the next one may succeed, and else another worker takes over. */
async function renewQuietly({ deps, id }: WorkerContext, job: ClaimedJob): Promise<void> {
  try {
    await renewLease(deps.db, job.id, id, leaseFrom(deps.now()));
  } catch (error) {
    deps.log.warn({ jobId: job.id, workerId: id, ...describeError(error) }, 'a lease was not renewed');
  }
}

async function doJob(worker: WorkerContext, job: ClaimedJob): Promise<void> {
  const { deps, id: workerId } = worker;
  const started = performance.now();
  const fields = { jobId: job.id, jobKind: job.kind, attempt: job.attempt, workerId };
  try {
    const task = taskOf(worker, job);
    if (job.attempt > job.maxAttempts) throw new Error('the worker ended during the last try');
    await task.run();
    await finishJob(deps.db, job.id, workerId, deps.now());
    deps.log.info({ ...fields, milliseconds: Math.round(performance.now() - started) }, 'job done');
  } catch (error) {
    const isLast = job.attempt >= job.maxAttempts;
    deps.log.warn({ ...fields, ...describeError(error) }, isLast ? 'job given up' : 'job failed, to be tried again');
    await putBack(worker, job, error, isLast);
  }
}

async function putBack(worker: WorkerContext, job: ClaimedJob, error: unknown, isLast: boolean): Promise<void> {
  const { deps, id } = worker;
  if (!isLast) return retryJob(deps.db, job.id, id, formatFailure(error), retryAfter(job.attempt, deps.now()));
  await giveUpQuietly(worker, job, error);
  await buryJob(deps.db, job.id, id, formatFailure(error), deps.now());
}

/** A job that cannot even be given up is buried all the same: it must not come back for ever. */
async function giveUpQuietly(worker: WorkerContext, job: ClaimedJob, thrown: unknown): Promise<void> {
  try {
    await taskOf(worker, job).giveUp(thrown);
  } catch (error) {
    worker.deps.log.error({ jobId: job.id, jobKind: job.kind, ...describeError(error) }, 'giving a job up failed');
  }
}

interface Task {
  run(): Promise<void>;
  giveUp(thrown: unknown): Promise<void>;
}

function taskOf(worker: WorkerContext, job: ClaimedJob): Task {
  if (!isJobKind(job.kind)) throw new Error('a job was claimed whose kind has no handler');
  return bindTask(worker, job.kind, job.payload);
}

function bindTask<K extends JobKind>({ deps, handlers }: WorkerContext, kind: K, payload: object): Task {
  const handler: JobHandler<JobPayload<K>> = handlers[kind];
  const parse = () => JOB_PAYLOADS[kind].parse(payload) as JobPayload<K>;
  return { run: async () => handler.run(deps, parse()), giveUp: async (thrown) => handler.giveUp(deps, parse(), thrown) };
}
