/** One run per data folder: the lock names the process, and a lock whose process is gone is nobody's. */
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { startTimeOf } from './processes.mjs';
import { SetupError } from './steps.mjs';

function readLock(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/** Who runs on this data folder: `{ pid, startTime, address? }`, or undefined. */
export function findRunning(dataDir) {
  const lock = readLock(path.join(dataDir, 'running.json'));
  return lock && startTimeOf(lock.pid) === lock.startTime ? lock : undefined;
}

export function takeLock(dataDir) {
  mkdirSync(dataDir, { recursive: true });
  const file = path.join(dataDir, 'running.json');
  const other = findRunning(dataDir);
  if (other) {
    const where = other.address ? ` at ${other.address}` : '';
    throw new SetupError(
      `Understave runs already from this folder${where} (process ${other.pid}). Stop that one first, or give this one a data folder of its own: DATA_DIR=…`,
    );
  }
  const mine = { pid: process.pid, startTime: startTimeOf(process.pid) };
  writeFileSync(file, JSON.stringify(mine));
  return {
    announce: (address) => writeFileSync(file, JSON.stringify({ ...mine, address })),
    release: () => rmSync(file, { force: true }),
  };
}
