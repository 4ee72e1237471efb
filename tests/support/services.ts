import { randomBytes, randomUUID } from 'node:crypto';
import { createConnection } from 'mysql2/promise';
import { createDb } from '@/db/client';
import { migrateDb } from '@/db/migrate';
import { getConfig } from '@/lib/config';
import { createLog } from '@/lib/log';
import { createS3Store } from '@/lib/storage/s3-store';
import type { Deps } from '@/lib/workflows/deps';

/** A clock that stands still until a test moves it. */
export interface TestClock {
  now(): Date;
  set(instant: string): void;
  forward(milliseconds: number): void;
}

function createClock(start: string): TestClock {
  let at = new Date(start);
  return {
    now: () => at,
    set: (instant) => void (at = new Date(instant)),
    forward: (milliseconds) => void (at = new Date(at.getTime() + milliseconds)),
  };
}

export interface TestServices {
  /** The real thing throughout, but for its clock. */
  readonly deps: Deps;
  readonly clock: TestClock;
  readonly databaseUrl: string;
  close(): Promise<void>;
}

async function createDatabase(serverUrl: string): Promise<string> {
  const url = new URL(serverUrl);
  const name = `understave_${randomBytes(6).toString('hex')}`;
  const connection = await createConnection(serverUrl);
  await connection.query(`CREATE DATABASE ${name} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  await connection.end();
  url.pathname = `/${name}`;
  return url.href;
}

async function dropDatabase(databaseUrl: string): Promise<void> {
  const connection = await createConnection(databaseUrl);
  await connection.query(`DROP DATABASE ${new URL(databaseUrl).pathname.slice(1)}`);
  await connection.end();
}

/**
 * A migrated database of its own, and the run's object store and mail sink. In a test file:
 *
 *   let services: TestServices;
 *   beforeAll(async () => void (services = await openServices()));
 *   afterAll(() => services.close());
 */
export async function openServices(startOfTime = '2026-09-07T08:00:00.000Z'): Promise<TestServices> {
  const config = getConfig();
  const databaseUrl = await createDatabase(config.databaseUrl);
  await migrateDb(databaseUrl);
  const { db, close } = createDb(databaseUrl, 8);
  const clock = createClock(startOfTime);
  const deps: Deps = {
    db,
    storage: createS3Store(config.store),
    log: createLog('silent'),
    appUrl: config.appUrl,
    secret: config.authSecret,
    now: clock.now,
    newId: () => randomUUID(),
  };
  const closeAll = async () => {
    await close();
    await dropDatabase(databaseUrl);
  };
  return { deps, clock, databaseUrl, close: closeAll };
}
