/**
 * `npm run with-fakes -- COMMAND …`: runs a command with the environment of the fakes that `npm run dev` (or
 * `npm start`) is running, for instance `npm run with-fakes -- tsx db/migrate.ts`.
 */
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { findRunning } from './lock.mjs';
import { DATA_DIR, ROOT } from './places.mjs';
import { run } from './processes.mjs';

const [command, ...args] = process.argv.slice(2);
const file = path.join(DATA_DIR, 'env.json');
const running = findRunning(DATA_DIR);
if (!command || !running || !existsSync(file)) {
  console.error(command ? 'Nothing runs from this folder: npm run dev' : 'Usage: npm run with-fakes -- COMMAND …');
  process.exit(2);
}
const { ports: _ports, ...names } = JSON.parse(readFileSync(file, 'utf8'));
const address = running.address ? { APP_URL: running.address } : {};
const bin = path.join(ROOT, 'node_modules/.bin');
process.exit(await run(command, args, { env: { ...process.env, ...names, ...address, PATH: `${bin}:${process.env.PATH}` } }));
