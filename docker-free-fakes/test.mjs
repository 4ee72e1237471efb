/**
 * `npm test`: everything, from a clean clone. `npm test -- unit published` runs some parts; what follows a `--` is given to
 * them: `npm test -- e2e -- tests/e2e/sign-in.spec.ts`. The last line is `N passed, N failed`.
 */
import { mkdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { takeLock } from './lock.mjs';
import { checkNode, CHROMIUM, installNpmPackages, installPrograms, LILYPOND, MARIADB, PYTHON, XMLLINT } from './packages.mjs';
import { ROOT } from './places.mjs';
import { runSession } from './session.mjs';
import { say, SetupError } from './steps.mjs';
import { e2e, lint, types, vitest } from './test-parts.mjs';

const PARTS = { lint, types, unit: vitest('unit'), published: vitest('published'), integration: vitest('integration'), e2e };
/** Programs that a part needs. The corpus tests ask the scorer beside the repository, which is Python. */
const NEEDS = { published: [PYTHON, XMLLINT, LILYPOND], integration: [MARIADB], e2e: [MARIADB, CHROMIUM] };

function parseArguments() {
  const given = process.argv.slice(2);
  const cut = given.indexOf('--');
  const names = cut < 0 ? given : given.slice(0, cut);
  const unknown = names.find((name) => !Object.hasOwn(PARTS, name));
  if (unknown !== undefined) {
    console.error(`Usage: npm test [-- ${Object.keys(PARTS).join('|')} …] [-- arguments for them]`);
    process.exit(2);
  }
  return { names: names.length > 0 ? names : Object.keys(PARTS), args: cut < 0 ? [] : given.slice(cut + 1) };
}

/** `.data/test` keeps the build for the next run; a second run at the same time gets a folder of its own. */
function takeWorkFolder(defer) {
  const usual = '.data/test';
  const own = `.data/test-${process.pid}`;
  const [folder, lock] = tryLock(usual) ?? tryLock(own);
  const workDir = path.join(ROOT, folder);
  defer(async () => {
    lock.release();
    if (folder === own) rmSync(workDir, { recursive: true, force: true });
  });
  mkdirSync(workDir, { recursive: true });
  return { workDir, distDir: `${folder}/next` };
}

function tryLock(folder) {
  try {
    return [folder, takeLock(path.join(ROOT, folder))];
  } catch (error) {
    if (error instanceof SetupError) return undefined;
    throw error;
  }
}

/** A part that cannot even start has failed, and the others go on. */
async function runPart(name, run) {
  say(`\n── ${name} ──`);
  try {
    return await PARTS[name](run);
  } catch (error) {
    console.error(error instanceof SetupError ? error.message : error);
    return { passed: 0, failed: 1, skipped: 0 };
  }
}

const { names, args } = parseArguments();

/** Whoever counts by the last line must find one here, too. */
async function prepare() {
  try {
    checkNode();
    await installPrograms(names.flatMap((name) => NEEDS[name] ?? []));
    await installNpmPackages();
    return true;
  } catch (error) {
    console.error(error instanceof SetupError ? error.message : error);
    say('0 passed, 1 failed');
    return false;
  }
}

await runSession(async (defer) => {
  if (!(await prepare())) return 1;
  const folders = takeWorkFolder(defer);
  const totals = { passed: 0, failed: 0, skipped: 0 };
  const table = [];
  for (const name of names) {
    const from = performance.now();
    const counts = await runPart(name, { ...folders, args, defer });
    for (const key of Object.keys(totals)) totals[key] += counts[key];
    const seconds = Math.round((performance.now() - from) / 1000);
    table.push(`  ${name.padEnd(12)} ${counts.passed} passed, ${counts.failed} failed, ${counts.skipped} skipped, ${seconds} s`);
  }
  say(`\n${table.join('\n')}`);
  say(`${totals.passed} passed, ${totals.failed} failed`);
  return totals.failed === 0 ? 0 : 1;
});
