/**
 * Our own MariaDB instance: own data folder, loopback only, own port; the system's instance and configuration are never
 * touched. It runs as the user who started us (as root when that is root), so that it works wherever the checkout lies,
 * also below folders that the `mysql` user cannot enter.
 */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { commandLineOf, endStray, isRunning, runQuietly, spawnOwned } from './processes.mjs';
import { SetupError } from './steps.mjs';

export const DATABASE = 'understave';
const READY_WITHIN_MS = 60_000;

function serverProgram() {
  return ['/usr/sbin/mariadbd', '/usr/local/sbin/mariadbd', '/usr/libexec/mariadbd'].find((file) => existsSync(file));
}

export function isMariadbInstalled() {
  return serverProgram() !== undefined;
}

/** A Unix socket's path may have 107 bytes at most, a checkout's may be longer: the socket lies in the temporary folder. */
function socketFolder(dataDir) {
  const mark = createHash('sha256').update(dataDir).digest('hex').slice(0, 12);
  return path.join(os.tmpdir(), `understave-${os.userInfo().uid}-${mark}`);
}

/** Creates the system tables beside their place and moves them in when they are whole. */
async function createTables(dataDir) {
  const target = path.join(dataDir, 'mariadb');
  if (existsSync(target)) return;
  const draft = `${target}.new`;
  rmSync(draft, { recursive: true, force: true });
  const { code, output } = await runQuietly('mariadb-install-db', [
    '--no-defaults',
    `--user=${os.userInfo().username}`,
    `--datadir=${draft}`,
    '--auth-root-authentication-method=socket',
    `--auth-root-socket-user=${os.userInfo().username}`,
    '--skip-test-db',
    '--skip-name-resolve',
  ]);
  if (code !== 0) throw new SetupError(`mariadb-install-db failed (exit ${code}):\n${output}`);
  renameSync(draft, target);
}

/** SQL that every start repeats: the database and the one account of the app. */
function writeInitFile(dataDir, password) {
  const file = path.join(dataDir, 'mariadb-init.sql');
  const account = `'${DATABASE}'@'127.0.0.1'`;
  const lines = [
    `CREATE DATABASE IF NOT EXISTS ${DATABASE} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci;`,
    `CREATE OR REPLACE USER ${account} IDENTIFIED BY '${password}';`,
    // Tests make databases of their own beside the first: understave_…
    `GRANT ALL PRIVILEGES ON \`${DATABASE}%\`.* TO ${account};`,
  ];
  writeFileSync(file, `${lines.join('\n')}\n`, { mode: 0o600 });
  return file;
}

function pidFileOf(dataDir) {
  return path.join(dataDir, 'mariadb.pid');
}

/** A server that an earlier run left behind would keep the data folder locked. */
export async function endStrayServer(dataDir) {
  const pidFile = pidFileOf(dataDir);
  if (!existsSync(pidFile)) return;
  const pid = Number(readFileSync(pidFile, 'utf8'));
  if (commandLineOf(pid)?.includes(`--datadir=${path.join(dataDir, 'mariadb')}`)) await endStray(pid);
  rmSync(pidFile, { force: true });
}

/** The server greets a client only after it has recovered and run the init file. */
function isGreeting(port) {
  return new Promise((resolve) => {
    const socket = net.connect({ port, host: '127.0.0.1' });
    const finish = (answer) => {
      socket.destroy();
      resolve(answer);
    };
    socket.setTimeout(1_000, () => finish(false));
    socket.once('data', () => finish(true));
    socket.once('error', () => finish(false));
  });
}

async function waitUntilReady(child, port, logFile) {
  const until = Date.now() + READY_WITHIN_MS;
  while (Date.now() < until) {
    if (await isGreeting(port)) return;
    if (!isRunning(child)) break;
    await sleep(50);
  }
  const log = existsSync(logFile) ? readFileSync(logFile, 'utf8').split('\n').slice(-15).join('\n') : '';
  throw new SetupError(`MariaDB did not start. The end of ${logFile}:\n${log}`);
}

function serverArguments({ dataDir, socketDir, initFile, port, throwaway }) {
  return [
    '--no-defaults',
    `--user=${os.userInfo().username}`,
    `--datadir=${path.join(dataDir, 'mariadb')}`,
    `--socket=${path.join(socketDir, 'mariadb.sock')}`,
    `--pid-file=${pidFileOf(dataDir)}`,
    `--init-file=${initFile}`,
    `--port=${port}`,
    '--bind-address=127.0.0.1',
    '--skip-name-resolve',
    '--character-set-server=utf8mb4',
    '--collation-server=utf8mb4_unicode_ci',
    '--default-time-zone=+00:00',
    '--local-infile=0',
    // A machine's crash may cost the last second here; a crash of the server alone costs nothing.
    '--innodb-flush-log-at-trx-commit=2',
    // For tests, whose data nobody needs after a crash.
    ...(throwaway ? ['--innodb-flush-method=nosync', '--sync-frm=0', '--innodb-doublewrite=0'] : []),
  ];
}

/** Starts the server on `port` and resolves with its process once it takes connections. */
export async function startMariadb({ dataDir, port, password, logFile, throwaway }) {
  const program = serverProgram();
  if (!program) throw new SetupError('MariaDB is not installed: apt-get install mariadb-server-core mariadb-client-core');
  const socketDir = socketFolder(dataDir);
  mkdirSync(socketDir, { recursive: true, mode: 0o700 });
  await endStrayServer(dataDir);
  await createTables(dataDir);
  const initFile = writeInitFile(dataDir, password);
  const child = spawnOwned(program, serverArguments({ dataDir, socketDir, initFile, port, throwaway }), { logFile });
  await waitUntilReady(child, port, logFile);
  return child;
}

export function removeSocketFolder(dataDir) {
  rmSync(socketFolder(dataDir), { recursive: true, force: true });
}
