/** Loopback ports: a part keeps its port from run to run as long as nobody else took it. */
import { randomInt } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import path from 'node:path';

const HOST = '127.0.0.1';

/** Listens on `port` (0: any) for a moment; resolves with the port, or undefined when it is taken. */
function tryPort(port) {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(undefined));
    server.listen({ port, host: HOST, exclusive: true }, () => {
      const { port: got } = server.address();
      server.close(() => resolve(got));
    });
  });
}

export async function isFree(port) {
  return (await tryPort(port)) !== undefined;
}

/**
 * Below the ports that Linux gives to outgoing connections (from 32768): one of those could be in use just when the part it
 * was remembered for starts again.
 */
const FIRST_PORT = 20_000;
const END_OF_PORTS = 32_000;

export async function anyFreePort() {
  for (let tries = 0; tries < 20; tries += 1) {
    const port = await tryPort(randomInt(FIRST_PORT, END_OF_PORTS));
    if (port !== undefined) return port;
  }
  return tryPort(0);
}

/** `wanted` when it is free, else the next free one of the following nineteen. */
export async function freePortFrom(wanted) {
  for (let port = wanted; port < wanted + 20; port += 1) if (await isFree(port)) return port;
  return anyFreePort();
}

/** Ports for the named parts, remembered in `ports.json` of the data folder. */
export async function choosePorts(dataDir, names) {
  const file = path.join(dataDir, 'ports.json');
  const before = existsSync(file) ? parsePorts(readFileSync(file, 'utf8')) : {};
  const ports = {};
  for (const name of names) {
    const known = before[name];
    ports[name] = Number.isInteger(known) && (await isFree(known)) ? known : await anyFreePort();
  }
  writeFileSync(file, `${JSON.stringify(ports, null, 2)}\n`);
  return ports;
}

function parsePorts(text) {
  try {
    return JSON.parse(text) ?? {};
  } catch {
    return {};
  }
}
