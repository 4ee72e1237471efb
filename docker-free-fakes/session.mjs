/** A run from start to end: what was started is stopped in the opposite order, whatever ends the run. */
import { onEnd } from './processes.mjs';
import { say, SetupError } from './steps.mjs';

/**
 * Runs `work(defer)`; `defer(stop)` registers what must be stopped. When `work` returns a number, the run ends with it;
 * else it goes on until Ctrl-C or a signal, and ends with 0. A SetupError is told without its stack and ends it with 1.
 */
export async function runSession(work) {
  const stops = [];
  let ended;
  const end = (code, reason) => (ended ??= finish(code, reason));
  const finish = async (code, reason) => {
    if (reason && stops.length > 0) say(`\nStopping (${reason}) …`);
    for (const stop of stops.reverse()) await stop().catch((error) => console.error(error));
    if (reason) say('Stopped.');
    process.exit(code);
  };
  onEnd((reason) => end(0, reason));
  try {
    const code = await work((stop) => stops.push(stop), end);
    if (typeof code === 'number') await end(code);
  } catch (error) {
    if (ended) return;
    console.error(error instanceof SetupError ? `\n${error.message}` : error);
    await end(1);
  }
}

/** The command's flags; anything unknown ends the run with 2. */
export function parseFlags(usage, known) {
  const flags = process.argv.slice(2);
  const unknown = flags.find((flag) => !known.includes(flag));
  if (unknown !== undefined || flags.includes('--help')) {
    console.error(unknown && unknown !== '--help' ? `Unknown argument: ${unknown}\n${usage}` : usage);
    process.exit(unknown && unknown !== '--help' ? 2 : 0);
  }
  return new Set(flags);
}

/** PORT when it is set (it must be a port), else undefined. */
export function parsePort() {
  const text = process.env.PORT;
  if (!text) return undefined;
  const port = Number(text);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    console.error(`PORT is ${text}; it must be a number from 1 to 65535.`);
    process.exit(2);
  }
  return port;
}
