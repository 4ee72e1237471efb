import type { Db } from '@/db/client';
import { insertJob } from '@/db/queries/jobs';
import { JOB_PAYLOADS, type JobKind, type JobPayload } from './kinds';

/** Tries before a job is given up: with the waits between them, about half an hour. */
const MAX_ATTEMPTS = 6;

export interface JobOptions {
  readonly id: string;
  readonly now: Date;
  readonly runAfter?: Date;
}

/**
 * Queues work in the transaction of what it belongs to: `enqueue(deps.db, 'read_score', { scoreId }, { id: deps.newId(),
 * now: deps.now() })`. A job of the same kind and payload that has not ended yet is not queued again.
 */
export async function enqueue<K extends JobKind>(db: Db, kind: K, payload: JobPayload<K>, options: JobOptions): Promise<void> {
  const known = JOB_PAYLOADS[kind].parse(payload);
  const { id, now, runAfter = now } = options;
  const dedupeKey = `${kind}:${Object.values(known).join(':')}`;
  await insertJob(db, { id, kind, payload: known, dedupeKey, maxAttempts: MAX_ATTEMPTS, runAfter }, now);
}
