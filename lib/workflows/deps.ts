import { randomUUID } from 'node:crypto';
import { type Db, createDb } from '@/db/client';
import { type Config, getConfig } from '@/lib/config';
import { type Log, createLog } from '@/lib/log';
import type { ObjectStore } from '@/lib/storage/object-store';
import { createS3Store } from '@/lib/storage/s3-store';

export type { Log };

/** Everything a workflow reaches outside itself. Tests make their own with the real database and a fixed clock. */
export interface Deps {
  readonly db: Db;
  readonly storage: ObjectStore;
  readonly log: Log;
  /** Scheme, host and port; links in mails start with it. */
  readonly appUrl: string;
  /** Key of keyed hashes. */
  readonly secret: string;
  now(): Date;
  /** A new row's id. */
  newId(): string;
}

/** The same work inside a transaction. */
export function inTransaction<T>(deps: Deps, work: (deps: Deps) => Promise<T>): Promise<T> {
  return deps.db.transaction((db) => work({ ...deps, db }));
}

function openDeps(config: Config): Deps {
  return {
    db: createDb(config.databaseUrl).db,
    storage: createS3Store(config.store),
    log: createLog(config.logLevel),
    appUrl: config.appUrl,
    secret: config.authSecret,
    now: () => new Date(),
    newId: () => randomUUID(),
  };
}

// The server's bundles each load this module: the process, not the module, holds the one pool.
const PROCESS = globalThis as { understaveDeps?: Deps };

/** The process's own deps: one pool, made at the first call. */
export function createDeps(): Deps {
  PROCESS.understaveDeps ??= openDeps(getConfig());
  return PROCESS.understaveDeps;
}
