import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';
import { unusedPort } from './ports';

const NEXT = path.resolve('node_modules/next/dist/bin/next');

/** A web process of a test's own beside the one all tests share, on the same build, database and store: it can be killed. */
export interface OwnServer {
  readonly address: string;
  /** As when the machine loses power: nothing is finished. */
  kill(): Promise<void>;
  start(): Promise<void>;
}

/** Null where no build is known: against a server that was started by hand. */
export async function openOwnServer(): Promise<OwnServer | null> {
  if (!process.env['NEXT_DIST_DIR']) return null;
  const port = await unusedPort();
  const address = `http://localhost:${port}`;
  let child: ChildProcess | null = null;
  const server: OwnServer = {
    address,
    async kill() {
      const dying = child;
      child = null;
      if (!dying || dying.exitCode !== null) return;
      const ended = new Promise((resolve) => dying.once('exit', resolve));
      dying.kill('SIGKILL');
      await ended;
    },
    async start() {
      child = spawn(process.execPath, [NEXT, 'start', '-H', '127.0.0.1', '-p', String(port)], { env: { ...process.env, NODE_ENV: 'production', APP_URL: address }, stdio: 'ignore' });
      await untilUp(address);
    },
  };
  await server.start();
  return server;
}

async function untilUp(address: string): Promise<void> {
  for (let turn = 0; turn < 240; turn += 1) {
    const answer = await fetch(`${address}/api/health`).catch(() => null);
    if (answer) return;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  throw new Error(`the test's own server at ${address} does not answer`);
}
