/**
 * `node lib/cli/bundled.mjs NAME …` runs lib/cli/NAME.ts from one bundled file. Through tsx, modules read each other's values
 * by getters, which takes more than half of the time of a long calculation.
 */
import { rmSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';

const [name = '', ...args] = process.argv.slice(2);
// Beside its source: paths that are reckoned from the file stay true.
const file = path.join(import.meta.dirname, `${name}.bundle.mjs`);
await build({
  entryPoints: [path.join(import.meta.dirname, `${name}.ts`)],
  outfile: file,
  bundle: true,
  packages: 'external',
  platform: 'node',
  format: 'esm',
  logLevel: 'error',
});
process.on('exit', () => rmSync(file, { force: true }));
process.argv = [process.execPath, file, ...args];
await import(pathToFileURL(file).href);
