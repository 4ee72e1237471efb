import { and, asc, eq, gte, inArray, lt, lte, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { jobs, workerHeartbeats } from '@/db/schema';

export interface NewJob {
  readonly id: string;
  readonly kind: string;
  readonly payload: object;
  /** While a job with this key is queued or running, another is not added. */
  readonly dedupeKey: string | null;
  readonly maxAttempts: number;
  readonly runAfter: Date;
}

/** A job that this worker holds until its lease ends. `attempt` counts from 1. */
export interface ClaimedJob {
  readonly id: string;
  readonly kind: string;
  readonly payload: object;
  readonly attempt: number;
  readonly maxAttempts: number;
}

/** Adds a job; nothing happens when one with its key is alive. */
export async function insertJob(db: Db, job: NewJob, now: Date): Promise<void> {
  await db
    .insert(jobs)
    .values({ ...job, createdAt: now, updatedAt: now })
    .onDuplicateKeyUpdate({ set: { id: sql`${jobs.id}` } });
}

const CLAIM_COLUMNS = {
  id: jobs.id,
  kind: jobs.kind,
  payload: jobs.payload,
  attempts: jobs.attempts,
  maxAttempts: jobs.maxAttempts,
} as const;

/** Due jobs, and those whose worker let its lease run out; the two lists are separate so that each has its index. */
async function lockDueJobs(tx: Db, kinds: readonly string[], now: Date, limit: number) {
  const isKnown = inArray(jobs.kind, [...kinds]);
  const dropped = await tx
    .select(CLAIM_COLUMNS)
    .from(jobs)
    .where(and(eq(jobs.state, 'running'), lt(jobs.leasedUntil, now), isKnown))
    .orderBy(asc(jobs.leasedUntil))
    .limit(limit)
    .for('update', { skipLocked: true });
  if (dropped.length === limit) return dropped;
  const queued = await tx
    .select(CLAIM_COLUMNS)
    .from(jobs)
    .where(and(eq(jobs.state, 'queued'), lte(jobs.runAfter, now), isKnown))
    .orderBy(asc(jobs.runAfter))
    .limit(limit - dropped.length)
    .for('update', { skipLocked: true });
  return [...dropped, ...queued];
}

/** Who asks for jobs: its id, and the kinds it knows. Those of a newer release stay for a newer worker. */
export interface Claimant {
  readonly workerId: string;
  readonly kinds: readonly string[];
}

/**
 * Takes up to `limit` jobs for a worker until `leaseUntil`. Rows that another worker is taking are passed over, so any
 * number of workers may ask at once. A job that was given up on the last attempt it had comes back with
 * `attempt > maxAttempts`: its worker died with it, and it is to be buried, not run.
 */
export async function claimJobs(db: Db, { workerId, kinds }: Claimant, limit: number, now: Date, leaseUntil: Date): Promise<ClaimedJob[]> {
  return db.transaction(
    async (tx) => {
      const due = await lockDueJobs(tx, kinds, now, limit);
      if (due.length === 0) return [];
      await tx
        .update(jobs)
        .set({
          state: 'running',
          attempts: sql`${jobs.attempts} + 1`,
          leasedBy: workerId,
          leasedUntil: leaseUntil,
          updatedAt: now,
        })
        .where(inArray(jobs.id, due.map((job) => job.id)));
      return due.map(({ attempts, ...job }) => ({ ...job, attempt: attempts + 1 }));
    },
    // Under REPEATABLE READ the range locks of one worker would hold up the next.
    { isolationLevel: 'read committed' },
  );
}

/** The job, as long as this worker still holds it: a worker that lost its lease must not speak for the job. */
function held(jobId: string, workerId: string) {
  return and(eq(jobs.id, jobId), eq(jobs.state, 'running'), eq(jobs.leasedBy, workerId));
}

const RELEASED = { leasedBy: null, leasedUntil: null } as const;

export async function renewLease(db: Db, jobId: string, workerId: string, leaseUntil: Date): Promise<void> {
  await db.update(jobs).set({ leasedUntil: leaseUntil }).where(held(jobId, workerId));
}

export async function finishJob(db: Db, jobId: string, workerId: string, now: Date): Promise<void> {
  await db
    .update(jobs)
    .set({ ...RELEASED, state: 'done', dedupeKey: null, lastError: null, finishedAt: now, updatedAt: now })
    .where(held(jobId, workerId));
}

export async function retryJob(db: Db, jobId: string, workerId: string, error: string, runAfter: Date): Promise<void> {
  await db
    .update(jobs)
    .set({ ...RELEASED, state: 'queued', runAfter, lastError: error })
    .where(held(jobId, workerId));
}

/** Gives a job up for good. */
export async function buryJob(db: Db, jobId: string, workerId: string, error: string, now: Date): Promise<void> {
  await db
    .update(jobs)
    .set({ ...RELEASED, state: 'dead', dedupeKey: null, lastError: error, finishedAt: now, updatedAt: now })
    .where(held(jobId, workerId));
}

/** Puts back what a stopping worker holds; the attempt does not count. */
export async function returnJobs(db: Db, jobIds: readonly string[], workerId: string, now: Date): Promise<void> {
  if (jobIds.length === 0) return;
  await db
    .update(jobs)
    .set({ ...RELEASED, state: 'queued', attempts: sql`greatest(${jobs.attempts} - 1, 0)`, runAfter: now })
    .where(and(inArray(jobs.id, [...jobIds]), eq(jobs.state, 'running'), eq(jobs.leasedBy, workerId)));
}

/** Removes jobs that ended before `before`, a bounded number at a time. */
export async function deleteEndedJobs(db: Db, before: Date): Promise<void> {
  await db
    .delete(jobs)
    .where(and(or(eq(jobs.state, 'done'), eq(jobs.state, 'dead')), lt(jobs.finishedAt, before)))
    .limit(500);
}

export async function saveHeartbeat(db: Db, workerId: string, seenAt: Date): Promise<void> {
  await db.insert(workerHeartbeats).values({ workerId, seenAt }).onDuplicateKeyUpdate({ set: { seenAt } });
}

export async function deleteHeartbeat(db: Db, workerId: string): Promise<void> {
  await db.delete(workerHeartbeats).where(eq(workerHeartbeats.workerId, workerId));
}

export async function deleteHeartbeatsBefore(db: Db, before: Date): Promise<void> {
  await db.delete(workerHeartbeats).where(lt(workerHeartbeats.seenAt, before));
}

/** True when some worker was seen since `since`. */
export async function hasHeartbeatSince(db: Db, since: Date): Promise<boolean> {
  const rows = await db
    .select({ workerId: workerHeartbeats.workerId })
    .from(workerHeartbeats)
    .where(gte(workerHeartbeats.seenAt, since))
    .limit(1);
  return rows.length > 0;
}

/** Rejects when the database does not answer. */
export async function pingDatabase(db: Db): Promise<void> {
  await db.execute(sql`select 1`);
}
