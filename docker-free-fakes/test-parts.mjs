/** The parts of `npm test`. Each runs to its end with its output shown, and resolves with its counts. */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { build, isBuilt, runProgram, startWeb, startWorker, waitUntilHealthy } from './app.mjs';
import { startFakes } from './fakes.mjs';
import { ROOT } from './places.mjs';
import { anyFreePort } from './ports.mjs';
import { exitOf, spawnOwned, stopOwned } from './processes.mjs';
import { step } from './steps.mjs';

/** @typedef {{ passed: number, failed: number, skipped: number }} Counts */

/** A check that either holds or does not counts as one test. @returns {Counts} */
function oneTest(isPassed) {
  return { passed: isPassed ? 1 : 0, failed: isPassed ? 0 : 1, skipped: 0 };
}

function nodeTool(place) {
  return path.join(ROOT, 'node_modules', place);
}

/** Runs a tool of node_modules with its output shown; it ends when the run does. */
async function runTool(defer, place, args, env = process.env) {
  const child = spawnOwned(process.execPath, [nodeTool(place), ...args], { cwd: ROOT, env });
  defer(() => stopOwned(child));
  return exitOf(child);
}

export async function lint({ defer }) {
  return oneTest((await runTool(defer, 'eslint/bin/eslint.js', ['.', '--max-warnings', '0'])) === 0);
}

export async function types({ defer }) {
  return oneTest((await runTool(defer, 'typescript/bin/tsc', ['--noEmit'])) === 0);
}

/** Where a tool is to write its report; an earlier run's is removed, lest it be counted for this one. */
function freshReport(workDir, name) {
  const file = path.join(workDir, `${name}.json`);
  rmSync(file, { force: true });
  return file;
}

function readReport(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined;
}

/** A file that could not even be loaded has no tests in the report, and counts as one that failed. @returns {Counts} */
function countVitest(report, code) {
  if (!report) return oneTest(false);
  const notLoaded = report.testResults.filter(({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0).length;
  const failed = report.numFailedTests + notLoaded;
  return {
    passed: report.numPassedTests,
    // An error outside any test fails the run without failing a test.
    failed: failed === 0 && code !== 0 ? 1 : failed,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}

export function vitest(project) {
  return async ({ defer, workDir, args }) => {
    const file = freshReport(workDir, project);
    const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`];
    const code = await runTool(defer, 'vitest/vitest.mjs', ['run', '--project', project, ...reporters, ...args]);
    return countVitest(readReport(file), code);
  };
}

/** The production build with the demo in it, on ports and in folders of its own. */
export async function serveDemo({ defer, workDir, distDir }) {
  const dataDir = mkdtempSync(path.join(os.tmpdir(), 'understave-e2e-'));
  defer(async () => rmSync(dataDir, { recursive: true, force: true }));
  const fakes = await startFakes(dataDir, { throwaway: true });
  defer(fakes.stop);
  const port = await anyFreePort();
  const address = `http://localhost:${port}`;
  const env = { ...process.env, ...fakes.env, NODE_ENV: 'production', APP_URL: address, NEXT_DIST_DIR: distDir, LOG_LEVEL: 'warn' };
  await step('Migrations', () => runProgram('lib/cli/migrate.ts', env).then(() => {}));
  await step('Demo', () => runProgram('db/seed/index.ts', env).then(() => {}));
  await step('Build', async () => (isBuilt(distDir) ? 'nothing changed' : build(distDir, env)));
  const logFile = path.join(workDir, 'web.log');
  const web = startWeb({ mode: 'start', port, env, logFile });
  defer(() => stopOwned(web));
  const worker = startWorker({ env, logFile: path.join(workDir, 'worker.log') });
  defer(() => stopOwned(worker));
  await step(`Web server and worker at ${address}`, () => waitUntilHealthy(address, [web, worker], logFile));
  return { ...env, BASE_URL: address };
}

/** @returns {Counts} */
function countPlaywright(report, code) {
  if (!report) return oneTest(false);
  const { expected, unexpected, flaky, skipped } = report.stats;
  const failed = unexpected + flaky + report.errors.length;
  return { passed: expected, failed: failed === 0 && code !== 0 ? 1 : failed, skipped };
}

export async function e2e(run) {
  const env = await serveDemo(run);
  const file = freshReport(run.workDir, 'e2e');
  const playwrightEnv = { ...env, NODE_ENV: 'test', PLAYWRIGHT_JSON_OUTPUT_NAME: file };
  const args = ['test', '--reporter=list,json', ...run.args];
  const code = await runTool(run.defer, '@playwright/test/cli.js', args, playwrightEnv);
  return countPlaywright(readReport(file), code);
}
