import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { createConnection } from 'mysql2/promise';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Fakes, startFakes } from '../../../docker-free-fakes/fakes.mjs';

/** Longer than a path to a Unix socket may be: a checkout can lie anywhere. */
const DEEP = 'a-folder-with-quite-a-long-name/'.repeat(4);

let root: string;
let dataDir: string;
let fakes: Fakes;
beforeAll(async () => {
  root = await mkdtemp(path.join(tmpdir(), 'understave-fakes-'));
  dataDir = path.join(root, DEEP, '.data');
  fakes = await startFakes(dataDir, { throwaway: true });
});
afterAll(async () => {
  await fakes.stop();
  await rm(root, { recursive: true, force: true });
});

async function query(sql: string): Promise<unknown> {
  const connection = await createConnection(fakes.env['DATABASE_URL'] ?? '');
  try {
    return (await connection.query(sql))[0];
  } finally {
    await connection.end();
  }
}

async function serverPid(): Promise<number> {
  return Number(await readFile(path.join(dataDir, 'mariadb.pid'), 'utf8'));
}

describe('startFakes', () => {
  it('gives a database of ours, in UTF-8 and UTC, that tells no case from another only where we say so', async () => {
    expect(await query("select @@character_set_database c, @@time_zone z, 'ii' = 'II' same")).toEqual([{ c: 'utf8mb4', z: '+00:00', same: 1 }]);
  });

  it('refuses a second run on the same data folder, and says who runs', async () => {
    await expect(startFakes(dataDir)).rejects.toThrow(`runs already from this folder (process ${process.pid})`);
  });

  it('starts the database again when it dies, with what was committed', async () => {
    await query('create table kept (n int)');
    await query('insert into kept values (7)');
    process.kill(await serverPid(), 'SIGKILL');
    let rows: unknown;
    while (!rows) rows = await query('select n from kept').catch(() => sleep(100));
    expect(rows).toEqual([{ n: 7 }]);
  });

  it('keeps ports, password and data from run to run', async () => {
    const before = fakes.env;
    await fakes.stop();
    fakes = await startFakes(dataDir, { throwaway: true });
    expect(fakes.env).toEqual(before);
    expect(await query('select n from kept')).toEqual([{ n: 7 }]);
  });

  it('keeps the environment for other commands in env.json', async () => {
    const kept: unknown = JSON.parse(await readFile(path.join(dataDir, 'env.json'), 'utf8'));
    expect(kept).toMatchObject(fakes.env);
  });
});
