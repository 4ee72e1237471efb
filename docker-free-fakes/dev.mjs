/** `npm run dev`: the fakes, the migrations, `next dev` and a worker. PORT sets the port (3000). */
import { hasProgram, runProgram, startWeb, startWorker } from './app.mjs';
import { startFakes } from './fakes.mjs';
import { checkNode, installNpmPackages, installPrograms, MARIADB } from './packages.mjs';
import { DATA_DIR } from './places.mjs';
import { exitOf, stopOwned } from './processes.mjs';
import { freePortFrom, isFree } from './ports.mjs';
import { parseFlags, parsePort, runSession } from './session.mjs';
import { say, SetupError, step } from './steps.mjs';
import { supervise } from './supervise.mjs';

parseFlags('Usage: npm run dev   (PORT=3000, DATA_DIR=.data)', []);
const wanted = parsePort();

await runSession(async (defer, end) => {
  checkNode();
  await installPrograms([MARIADB]);
  await installNpmPackages();
  const port = wanted ?? (await freePortFrom(3000));
  if (!(await isFree(port))) throw new SetupError(`Port ${port} is taken. Choose another: PORT=… npm run dev`);
  const address = `http://localhost:${port}`;
  const fakes = await startFakes(DATA_DIR);
  defer(fakes.stop);
  const env = { ...process.env, ...fakes.env, NODE_ENV: 'development', APP_URL: address };
  await step('Migrations', () => runProgram('lib/cli/migrate.ts', env).then(() => {}));
  if (hasProgram('db/seed/index.ts')) await step('Demo', () => runProgram('db/seed/index.ts', env).then(() => {}));
  const web = startWeb({ mode: 'dev', port, env });
  defer(() => stopOwned(web));
  // A worker runs the code it was started with: end it after a change, and it starts again.
  const worker = await supervise('worker', () => startWorker({ env }));
  defer(worker.stop);
  fakes.lock.announce(address);
  say(`\nUnderstave (development): ${address}\n`);
  void exitOf(web).then((code) => end(code === 0 ? 0 : 1, 'the web server ended'));
});
