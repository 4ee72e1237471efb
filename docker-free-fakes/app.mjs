/** The app's own processes and chores: migrations, the demo, the build, the web server, the worker. */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { NEXT, ROOT, TYPESCRIPT } from './places.mjs';
import { isRunning, runQuietly, spawnOwned } from './processes.mjs';
import { SetupError } from './steps.mjs';

/** Node 20 is what Debian 12 machines have; that the AWS SDK will ask for a newer one in 2027 need not fill the logs. */
const QUIET = { NEXT_TELEMETRY_DISABLED: '1', AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true' };

/** Runs one of our TypeScript programs quietly to its end; what it printed is returned, or shown when it failed. */
export async function runProgram(file, env, args = []) {
  const { code, output } = await runQuietly(process.execPath, [...TYPESCRIPT, file, ...args], { cwd: ROOT, env: { ...env, ...QUIET } });
  if (code !== 0) throw new SetupError(`${file} failed (exit ${code}):\n${output}`);
  return output;
}

export function hasProgram(file) {
  return existsSync(path.join(ROOT, file));
}

/** What a build depends on. Tests, fixtures and our scripts are not part of it. */
const BUILT_FROM = ['app', 'components', 'db', 'lib', 'public'];
const BUILT_FROM_FILES = /^(package-lock\.json|tsconfig.*\.json|(next|postcss)\.config\.mjs|(proxy|instrumentation.*)\.ts)$/;

function* filesBelow(folder) {
  for (const entry of readdirSync(folder, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const place = path.join(folder, entry.name);
    if (entry.isDirectory()) yield* filesBelow(place);
    else if (entry.isFile()) yield place;
  }
}

/** One hash over names and contents of everything the build reads. */
export function hashSources() {
  const hash = createHash('sha256').update(process.versions.node);
  const add = (file) => hash.update(path.relative(ROOT, file)).update('\0').update(readFileSync(file)).update('\0');
  for (const name of readdirSync(ROOT).sort()) {
    const place = path.join(ROOT, name);
    if (BUILT_FROM.includes(name) && statSync(place).isDirectory()) for (const file of filesBelow(place)) add(file);
    else if (BUILT_FROM_FILES.test(name)) add(place);
  }
  return hash.digest('hex');
}

function stampOf(distDir) {
  return path.join(ROOT, distDir, 'sources.sha256');
}

export function isBuilt(distDir) {
  const stamp = stampOf(distDir);
  const whole = existsSync(path.join(ROOT, distDir, 'BUILD_ID')) && existsSync(stamp);
  return whole && readFileSync(stamp, 'utf8') === hashSources();
}

/** `next build` into `distDir`; the stamp is written last, so that a broken-off build is never taken for a whole one. */
export async function build(distDir, env) {
  const sources = hashSources();
  rmSync(stampOf(distDir), { force: true });
  mkdirSync(path.join(ROOT, distDir), { recursive: true });
  const buildEnv = { ...env, NODE_ENV: 'production', NEXT_DIST_DIR: distDir, ...QUIET };
  const { code, output } = await runQuietly(process.execPath, [NEXT, 'build'], { cwd: ROOT, env: buildEnv });
  if (code !== 0) throw new SetupError(`The build failed (exit ${code}):\n${output}`);
  writeFileSync(stampOf(distDir), sources);
}

export function startWeb({ mode, port, env, logFile }) {
  const args = [NEXT, mode, '-H', '127.0.0.1', '-p', String(port)];
  return spawnOwned(process.execPath, args, { cwd: ROOT, env: { ...env, ...QUIET }, logFile });
}

export function startWorker({ env, logFile }) {
  return spawnOwned(process.execPath, [...TYPESCRIPT, 'lib/cli/worker.ts'], { cwd: ROOT, env: { ...env, ...QUIET }, logFile });
}

function endOf(logFile) {
  const text = logFile && existsSync(logFile) ? readFileSync(logFile, 'utf8') : '';
  return text.split('\n').slice(-15).join('\n');
}

/** Waits until the health route answers 200; `processes` must stay alive meanwhile. */
export async function waitUntilHealthy(address, processes, logFile, withinMs = 60_000) {
  const until = Date.now() + withinMs;
  let last = 'no answer';
  while (Date.now() < until && processes.every(isRunning)) {
    try {
      const response = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(10_000) });
      if (response.status === 200) return;
      last = `${response.status} ${await response.text()}`;
    } catch (error) {
      last = String(error.cause ?? error);
    }
    await sleep(100);
  }
  throw new SetupError(`The app does not answer (${last}).\n${endOf(logFile)}`);
}
