import { getConfig } from '@/lib/config';
import { ok } from '@/lib/result';
import { createSmtpMailer } from '@/lib/mail/smtp-mailer';
import { type Health, checkHealth } from '@/lib/workflows/check-health';
import { createDeps } from '@/lib/workflows/deps';
import { registerEndpoint } from './endpoint';

/** A busy monitor, or a hostile one, costs the parts one question in this time. */
const ASKED_AT_MOST_EVERY_MS = 1_000;

let latest: { readonly at: number; readonly health: Promise<Health> } | null = null;

function askHealth(): Promise<Health> {
  const now = Date.now();
  if (latest && now - latest.at < ASKED_AT_MOST_EVERY_MS) return latest.health;
  latest = { at: now, health: askParts() };
  return latest.health;
}

async function askParts(): Promise<Health> {
  const mailer = createSmtpMailer(getConfig().mail);
  try {
    return await checkHealth({ ...createDeps(), mailer });
  } finally {
    mailer.close();
  }
}

/** 200 `{ status: 'up', parts }`, or 503 `{ status: 'down', down: ['store'], parts }`. No session is looked at: it is in the database. */
async function answerHealth(): Promise<Response> {
  const { parts, down } = await askHealth();
  const body = down.length === 0 ? { status: 'up', parts } : { status: 'down', down, parts };
  return Response.json(body, { status: down.length === 0 ? 200 : 503, headers: { 'cache-control': 'no-store' } });
}

export const healthRoute = registerEndpoint(answerHealth, {
  name: 'health.read',
  kind: 'route',
  permission: 'signed out',
  run: async () => ok(await askHealth()),
});
