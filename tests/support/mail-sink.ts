import { getConfig } from '@/lib/config';

/** A mail as the sink keeps it. */
export interface SunkMail {
  readonly id: string;
  readonly to: readonly string[];
  readonly from: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string | null;
  readonly messageId: string | null;
}

/** The mails that arrived for an address, newest first. */
export async function mailsTo(address: string): Promise<readonly SunkMail[]> {
  const { sinkUrl } = getConfig().mail;
  if (!sinkUrl) throw new Error('no mail sink in this environment');
  const response = await fetch(`${sinkUrl}/mails?to=${encodeURIComponent(address)}`);
  return (await response.json()) as SunkMail[];
}
