/**
 * `npm run worker`: does jobs and sends mails until SIGTERM or SIGINT. Any number of these may run, on any number of
 * machines. Exit 0 after an orderly stop, 1 when the environment is not complete.
 */
import { randomUUID } from 'node:crypto';
import { hostname } from 'node:os';
import { getConfig } from '@/lib/config';
import { JOB_HANDLERS } from '@/lib/jobs/handlers';
import { runWorker } from '@/lib/jobs/worker';
import { describeError } from '@/lib/log';
import { createSmtpMailer } from '@/lib/mail/smtp-mailer';
import { createDeps } from '@/lib/workflows/deps';

/** Two scores are read at once; more would only take the processor from the web server beside it. */
const SLOTS = 2;

async function main(): Promise<void> {
  const stop = new AbortController();
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => stop.abort());
  const deps = createDeps();
  const mailer = createSmtpMailer(getConfig().mail);
  const id = `${hostname().slice(0, 36)}:${process.pid}:${randomUUID().slice(0, 8)}`;
  await runWorker({ id, deps, mailer, handlers: JOB_HANDLERS, slots: SLOTS, signal: stop.signal });
}

main().then(
  // The pool and the mail connection would keep the process.
  () => process.exit(0),
  (error: unknown) => {
    process.stderr.write(`${JSON.stringify({ level: 'fatal', msg: 'worker ended', ...describeError(error) })}\n`);
    if (error instanceof Error && error.name === 'ConfigError') process.stderr.write(`${error.message}\n`);
    process.exit(1);
  },
);
