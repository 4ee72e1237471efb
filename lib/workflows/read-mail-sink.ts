import { z } from 'zod';
import { getConfig } from '@/lib/config';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';

/** A mail as the local sink keeps it; see docker-free-fakes/mail-sink.mjs. */
const sunkMail = z.object({
  id: z.string(),
  receivedAt: z.iso.datetime().transform((text) => new Date(text)),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
});
export type SunkMail = z.output<typeof sunkMail>;

export interface MailSink {
  /** Newest first, at most 200. */
  readonly mails: readonly SunkMail[];
  /** Links in mails that start with it lead back into the app. */
  readonly appUrl: string;
}

const ANSWER_WITHIN_MS = 3_000;

/** For development and demos only: what the mail sink took. `not_found` where mails are really sent. */
export async function readMailSink(to: string | null): Promise<Result<MailSink, AppError>> {
  const { appUrl, mail } = getConfig();
  if (!mail.sinkUrl) return err(appError('not_found'));
  const query = to ? `?to=${encodeURIComponent(to)}` : '';
  try {
    const response = await fetch(`${mail.sinkUrl}/mails${query}`, { signal: AbortSignal.timeout(ANSWER_WITHIN_MS), cache: 'no-store' });
    return ok({ mails: z.array(sunkMail).parse(await response.json()), appUrl });
  } catch {
    return err(appError('unavailable', 'The mail sink does not answer. `npm start` and `npm run dev` start it along with the rest.'));
  }
}
