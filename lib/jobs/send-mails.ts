import type { Db } from '@/db/client';
import { type ClaimedMail, buryMail, claimMails, markMailSent, retryMail } from '@/db/queries/outbox-delivery';
import { type Log, describeError } from '@/lib/log';
import type { Mailer } from '@/lib/mail/mailer';
import { formatFailure, retryAfter } from './retry';

export interface OutboxDeps {
  readonly db: Db;
  readonly log: Log;
  readonly mailer: Mailer;
  now(): Date;
}

const BATCH = 10;
/** Longer than a batch of mails to a server that lets each run into its time limit. */
const LEASE_MS = 10 * 60_000;

/** Sends the mails that are due; true when there may be more. A mail is sent once or, after a crash, twice; never lost. */
export async function sendDueMails(deps: OutboxDeps, workerId: string): Promise<boolean> {
  const leaseUntil = new Date(deps.now().getTime() + LEASE_MS);
  const mails = await claimMails(deps.db, workerId, BATCH, deps.now(), leaseUntil);
  for (const mail of mails) await sendOne(deps, workerId, mail);
  return mails.length === BATCH;
}

async function sendOne(deps: OutboxDeps, workerId: string, mail: ClaimedMail): Promise<void> {
  try {
    await deps.mailer.send(mail);
  } catch (error) {
    return putBack(deps, workerId, mail, error);
  }
  await markMailSent(deps.db, mail.id, workerId, deps.now());
  deps.log.info({ mailId: mail.id, attempt: mail.attempt, workerId }, 'mail sent');
}

async function putBack(deps: OutboxDeps, workerId: string, mail: ClaimedMail, error: unknown): Promise<void> {
  const isLast = mail.attempt >= mail.maxAttempts;
  const fields = { mailId: mail.id, attempt: mail.attempt, workerId, ...describeError(error) };
  deps.log.warn(fields, isLast ? 'mail given up' : 'mail not sent, to be tried again');
  const failure = formatFailure(error);
  if (isLast) await buryMail(deps.db, mail.id, workerId, failure);
  else await retryMail(deps.db, mail.id, workerId, failure, retryAfter(mail.attempt, deps.now()));
}
