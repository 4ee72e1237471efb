/**
 * `npm start`: everything from a clean clone to a running product. Before the packages are there, only Node's own
 * modules may be imported. PORT sets the port, `-- --reset` starts with fresh data.
 */
import path from 'node:path';
import { build, hasProgram, isBuilt, runProgram, startWeb, startWorker, waitUntilHealthy } from './app.mjs';
import { sayDemo } from './demo.mjs';
import { forgetData, startFakes } from './fakes.mjs';
import { findRunning, takeLock } from './lock.mjs';
import { checkNode, installNpmPackages, installPrograms, MARIADB } from './packages.mjs';
import { DATA_DIR, ROOT } from './places.mjs';
import { freePortFrom, isFree } from './ports.mjs';
import { exitOf, stopOwned } from './processes.mjs';
import { parseFlags, parsePort, runSession } from './session.mjs';
import { say, SetupError, step } from './steps.mjs';
import { supervise } from './supervise.mjs';

const USAGE = 'Usage: npm start [-- --reset]   (PORT=3000, DATA_DIR=.data)';
const flags = parseFlags(USAGE, ['--reset', '--help']);
const wanted = parsePort();
const DIST_DIR = process.env.NEXT_DIST_DIR || '.next';
const DIST_PATH = path.join(ROOT, DIST_DIR);

async function choosePort() {
  const port = wanted ?? (await freePortFrom(3000));
  if (await isFree(port)) return port;
  throw new SetupError(`Port ${port} is taken. Choose another: PORT=… npm start`);
}

/** Another run's data folder must not be touched, nor its build be replaced under it. */
function checkAlone() {
  const other = findRunning(DATA_DIR);
  if (!other) return;
  const where = other.address ? `: ${other.address}` : '';
  throw new SetupError(`Understave runs already from this folder (process ${other.pid})${where}`);
}

/** A build replaced under a running server makes it answer with errors. */
async function buildUnlessServed(env) {
  if (isBuilt(DIST_DIR)) return 'nothing changed';
  const other = findRunning(DIST_PATH);
  if (other) throw new SetupError(`Process ${other.pid} serves the build in ${DIST_DIR}, and the sources have changed. Stop it, or build elsewhere: NEXT_DIST_DIR=…`);
  return build(DIST_DIR, env);
}

async function prepare(env) {
  await step('Migrations', () => runProgram('lib/cli/migrate.ts', env).then(() => {}));
  if (hasProgram('db/seed/index.ts')) await step('Demo', () => runProgram('db/seed/index.ts', env).then(() => {}));
  await step('Build', () => buildUnlessServed(env));
}

async function serve({ port, address, env, fakes, defer, end }) {
  const logFile = path.join(fakes.logDir, 'web.log');
  if (!findRunning(DIST_PATH)) {
    const served = takeLock(DIST_PATH);
    defer(async () => served.release());
  }
  const web = startWeb({ mode: 'start', port, env, logFile });
  defer(() => stopOwned(web));
  const worker = await supervise('worker', () => startWorker({ env, logFile: path.join(fakes.logDir, 'worker.log') }));
  defer(worker.stop);
  await step('Web server and worker', () => waitUntilHealthy(address, [web], logFile));
  void exitOf(web).then((code) => end(code === 0 ? 0 : 1, `the web server ended; see ${logFile}`));
}

await runSession(async (defer, end) => {
  const from = performance.now();
  say('Understave');
  checkNode();
  checkAlone();
  if (flags.has('--reset')) await step('Reset: the data of earlier runs is removed', () => forgetData(DATA_DIR));
  await installPrograms([MARIADB]);
  await installNpmPackages();
  const port = await choosePort();
  const address = `http://localhost:${port}`;
  const fakes = await startFakes(DATA_DIR);
  defer(fakes.stop);
  const env = { ...process.env, ...fakes.env, NODE_ENV: 'production', APP_URL: address, NEXT_DIST_DIR: DIST_DIR };
  await prepare(env);
  await serve({ port, address, env, fakes, defer, end });
  fakes.lock.announce(address);
  say(`\nReady in ${((performance.now() - from) / 1000).toFixed(0)} s: ${address}\n`);
  sayDemo(address);
  say(`Logs: ${path.relative(process.cwd(), fakes.logDir)}/   Ctrl-C stops everything.`);
});
