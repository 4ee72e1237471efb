/**
 * Child processes that never outlive us. Each is the leader of its own process group, so that a Ctrl-C in the terminal
 * reaches only us and we stop the parts in order; the kernel ends a child when we die without a word (setpriv
 * --pdeathsig, part of Debian's base system).
 */
import { spawn } from 'node:child_process';
import { closeSync, existsSync, openSync, readFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';

const SETPRIV = '/usr/bin/setpriv';
const STOP_WITHIN_MS = 20_000;

/** @param {{ env?: NodeJS.ProcessEnv, cwd?: string, logFile?: string, deathSignal?: 'TERM' | 'KILL' }} [options] */
export function spawnOwned(command, args, options = {}) {
  const { env = process.env, cwd, logFile, deathSignal = 'TERM' } = options;
  const log = logFile ? openSync(logFile, 'a') : undefined;
  const stdio = log === undefined ? ['ignore', 'inherit', 'inherit'] : ['ignore', log, log];
  const [program, programArgs] = existsSync(SETPRIV)
    ? [SETPRIV, ['--pdeathsig', deathSignal, command, ...args]]
    : [command, args];
  const child = spawn(program, programArgs, { cwd, env, stdio, detached: true });
  if (log !== undefined) closeSync(log);
  return child;
}

/** Resolves with the exit code (128 + n when a signal ended it, 127 when it could not start). */
export function exitOf(child) {
  if (child.exitCode !== null) return Promise.resolve(child.exitCode);
  if (child.signalCode !== null) return Promise.resolve(128);
  return new Promise((resolve) => {
    child.once('exit', (code, signal) => resolve(code ?? (signal ? 128 : 1)));
    child.once('error', () => resolve(127));
  });
}

export function isRunning(child) {
  return child.pid !== undefined && child.exitCode === null && child.signalCode === null;
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

/** Asks a child's whole group to end, and insists after 20 seconds. */
export async function stopOwned(child) {
  if (!isRunning(child)) return;
  const ended = exitOf(child);
  signalGroup(child.pid, 'SIGTERM');
  const patience = new AbortController();
  const insist = sleep(STOP_WITHIN_MS, 'late', { signal: patience.signal }).catch(() => 'ended');
  if ((await Promise.race([ended, insist])) === 'late') signalGroup(child.pid, 'SIGKILL');
  patience.abort();
  await ended;
}

/** Runs a command to its end; its output goes to `logFile` or to ours. Resolves with the exit code. */
export function run(command, args, options = {}) {
  return exitOf(spawnOwned(command, args, options));
}

/** Runs a command quietly and resolves with its code and everything it printed. */
export async function runQuietly(command, args, options = {}) {
  const child = spawn(command, args, { ...options, stdio: ['ignore', 'pipe', 'pipe'] });
  let output = '';
  child.stdout.on('data', (chunk) => (output += chunk));
  child.stderr.on('data', (chunk) => (output += chunk));
  const code = await new Promise((resolve) => {
    child.once('close', (exit) => resolve(exit ?? 128));
    child.once('error', (error) => {
      output += error.message;
      resolve(127);
    });
  });
  return { code, output };
}

/** The command line of a running process, or undefined when there is no such process. */
export function commandLineOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').filter(Boolean);
  } catch {
    return undefined;
  }
}

/** When the process started, in clock ticks since the machine's start: tells a process from a later one of the same id. */
export function startTimeOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
  } catch {
    return undefined;
  }
}

/** Ends a process that an earlier run left behind, and waits until it is gone. */
export async function endStray(pid) {
  for (const [signal, patience] of [['SIGTERM', 20_000], ['SIGKILL', 5_000]]) {
    try {
      process.kill(pid, signal);
    } catch {
      return;
    }
    const until = Date.now() + patience;
    while (Date.now() < until) {
      if (commandLineOf(pid) === undefined || commandLineOf(pid).length === 0) return;
      await sleep(50);
    }
  }
}

const PARENT_CHECK_MS = 1_000;

/**
 * Calls `stop` once, on Ctrl-C, a termination signal, a closed terminal, or when the npm that started us is gone.
 * A second Ctrl-C ends at once; the kernel then ends the children.
 */
export function onEnd(stop) {
  let ending = false;
  const end = (reason) => {
    if (ending) {
      if (reason === 'SIGINT') process.exit(130);
      return;
    }
    ending = true;
    void stop(reason);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => end(signal));
  if (process.env.npm_lifecycle_event === undefined) return;
  const parent = process.ppid;
  setInterval(() => process.ppid !== parent && end('the parent process ended'), PARENT_CHECK_MS).unref();
}
