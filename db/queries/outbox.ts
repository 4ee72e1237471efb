import type { Db } from '@/db/client';
import { outbox } from '@/db/schema';

export interface Mail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html?: string;
}

/** Queues a mail in the transaction of what it tells of; the worker sends it. */
export async function queueMail(db: Db, id: string, mail: Mail, now: Date): Promise<void> {
  await db.insert(outbox).values({
    id,
    toAddress: mail.to,
    subject: mail.subject,
    textBody: mail.text,
    htmlBody: mail.html ?? null,
    runAfter: now,
    createdAt: now,
  });
}
