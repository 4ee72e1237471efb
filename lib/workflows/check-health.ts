import type { Db } from '@/db/client';
import { hasHeartbeatSince, pingDatabase } from '@/db/queries/jobs';
import { HEARTBEAT_LASTS_MS } from '@/lib/jobs/heartbeat';
import { type Log, describeError } from '@/lib/log';
import type { Mailer } from '@/lib/mail/mailer';
import type { ObjectStore } from '@/lib/storage/object-store';

/** What the app needs to do its whole job, in the order they are named. */
export const PARTS = ['database', 'store', 'mail', 'worker'] as const;
export type Part = (typeof PARTS)[number];

export interface HealthDeps {
  readonly db: Db;
  readonly storage: ObjectStore;
  readonly mailer: Mailer;
  readonly log: Log;
  now(): Date;
}

export interface Health {
  readonly parts: Readonly<Record<Part, 'up' | 'down'>>;
  /** The parts that are down; empty when all is well. */
  readonly down: readonly Part[];
}

const CHECK_WITHIN_MS = 4_000;

/** Asks every part at the same time; one that does not answer within four seconds is down. */
export async function checkHealth(deps: HealthDeps): Promise<Health> {
  const checks: Readonly<Record<Part, () => Promise<unknown>>> = {
    database: () => pingDatabase(deps.db),
    store: () => deps.storage.check(),
    mail: () => deps.mailer.check(),
    worker: () => checkWorker(deps),
  };
  const states = await Promise.all(PARTS.map(async (part) => [part, await stateOf(deps, part, checks[part])] as const));
  const parts = Object.fromEntries(states) as Record<Part, 'up' | 'down'>;
  return { parts, down: PARTS.filter((part) => parts[part] === 'down') };
}

async function stateOf({ log }: HealthDeps, part: Part, check: () => Promise<unknown>): Promise<'up' | 'down'> {
  try {
    await within(CHECK_WITHIN_MS, check());
    return 'up';
  } catch (error) {
    log.warn({ part, ...describeError(error) }, 'a part is down');
    return 'down';
  }
}

async function checkWorker({ db, now }: HealthDeps): Promise<void> {
  const since = new Date(now().getTime() - HEARTBEAT_LASTS_MS);
  if (!(await hasHeartbeatSince(db, since))) throw new Error('no worker was seen lately');
}

function within<T>(milliseconds: number, work: Promise<T>): Promise<T> {
  let timer: NodeJS.Timeout;
  const late = new Promise<never>((_, reject) => {
    // One turn later: after a pause of our own (a busy machine), an answer that lies waiting counts.
    timer = setTimeout(() => setImmediate(() => reject(new Error('no answer in time'))), milliseconds);
  });
  return Promise.race([work, late]).finally(() => clearTimeout(timer));
}
