/** The demo's sign-ins, as the seed states them. */
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT } from './places.mjs';
import { say } from './steps.mjs';

const FILE = path.join(ROOT, 'db/seed/sign-ins.json');

/** @returns {{ password: string, people: { role: string, name: string, email: string }[] } | undefined} */
function readSignIns() {
  return existsSync(FILE) ? JSON.parse(readFileSync(FILE, 'utf8')) : undefined;
}

export function sayDemo(address) {
  const demo = readSignIns();
  if (!demo) return;
  say(`Demo sign-ins (password for all: ${demo.password})`);
  for (const { role, name, email } of demo.people) say(`  ${role.padEnd(12)} ${email.padEnd(34)} ${name}`);
  say(`Mail goes nowhere; read it at ${address}/mail-sink\n`);
}
