import { randomUUID } from 'node:crypto';
import pino from 'pino';
import { type Db, createDb } from '@/db/client';
import { type Config, getConfig } from '@/lib/config';

/** What a log line may be made of: ids, codes, counts, durations. Never a name, an e-mail, an address, a text or a mark. */
export interface Log {
  info(fields: object, message: string): void;
  warn(fields: object, message: string): void;
  error(fields: object, message: string): void;
}

/** Everything a workflow reaches outside itself. Tests make their own with the real database and a fixed clock. */
export interface Deps {
  readonly db: Db;
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
    log: pino({ level: config.logLevel, base: null }),
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
