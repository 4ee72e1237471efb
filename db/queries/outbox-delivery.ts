import { and, asc, eq, inArray, isNull, lt, lte, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { outbox } from '@/db/schema';

/** A mail that this worker is to send before its lease ends. `attempt` counts from 1. */
export interface ClaimedMail {
  readonly id: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string | null;
  readonly attempt: number;
  readonly maxAttempts: number;
}

const MAIL_COLUMNS = {
  id: outbox.id,
  to: outbox.toAddress,
  subject: outbox.subject,
  text: outbox.textBody,
  html: outbox.htmlBody,
  attempts: outbox.attempts,
  maxAttempts: outbox.maxAttempts,
} as const;

/** Takes due mails; those that another worker is taking are passed over. */
export async function claimMails(db: Db, workerId: string, limit: number, now: Date, leaseUntil: Date): Promise<ClaimedMail[]> {
  const isFree = or(isNull(outbox.leasedUntil), lt(outbox.leasedUntil, now));
  return db.transaction(
    async (tx) => {
      const due = await tx
        .select(MAIL_COLUMNS)
        .from(outbox)
        .where(and(eq(outbox.state, 'queued'), lte(outbox.runAfter, now), isFree))
        .orderBy(asc(outbox.runAfter))
        .limit(limit)
        .for('update', { skipLocked: true });
      if (due.length === 0) return [];
      await tx
        .update(outbox)
        .set({ attempts: sql`${outbox.attempts} + 1`, leasedBy: workerId, leasedUntil: leaseUntil })
        .where(inArray(outbox.id, due.map((mail) => mail.id)));
      return due.map(({ attempts, ...mail }) => ({ ...mail, attempt: attempts + 1 }));
    },
    { isolationLevel: 'read committed' },
  );
}

function held(mailId: string, workerId: string) {
  return and(eq(outbox.id, mailId), eq(outbox.state, 'queued'), eq(outbox.leasedBy, workerId));
}

const RELEASED = { leasedBy: null, leasedUntil: null } as const;

/** A sent mail keeps no text: it may hold a one-time link, and nobody reads it here again. */
export async function markMailSent(db: Db, mailId: string, workerId: string, now: Date): Promise<void> {
  await db
    .update(outbox)
    .set({ ...RELEASED, state: 'sent', sentAt: now, textBody: '', htmlBody: null, lastError: null })
    .where(held(mailId, workerId));
}

export async function retryMail(db: Db, mailId: string, workerId: string, error: string, runAfter: Date): Promise<void> {
  await db.update(outbox).set({ ...RELEASED, runAfter, lastError: error }).where(held(mailId, workerId));
}

export async function buryMail(db: Db, mailId: string, workerId: string, error: string): Promise<void> {
  await db.update(outbox).set({ ...RELEASED, state: 'dead', lastError: error }).where(held(mailId, workerId));
}

/** Removes mails that were sent before `before`, a bounded number at a time. */
export async function deleteSentMails(db: Db, before: Date): Promise<void> {
  await db.delete(outbox).where(and(eq(outbox.state, 'sent'), lt(outbox.sentAt, before))).limit(500);
}
