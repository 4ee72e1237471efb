import { listAudience, type Listener } from '@/db/queries/reading-audience';
import type { ReadingHead } from '@/db/queries/readings';
import { queueMail } from '@/db/queries/outbox';
import { findLabelStart, listThreadWriters } from '@/db/queries/remarks';
import type { Actor } from '@/lib/auth/actor';
import type { Deps } from './deps';

export interface SaidRemark {
  readonly body: string;
  readonly threadId: string | null;
  readonly labelId: string | null;
}

/** Those of `people` whom a text names as `@Name`, in whatever case; a longer name hides a shorter one it begins with. */
export function findMentioned<P extends { readonly name: string }>(body: string, people: readonly P[]): P[] {
  let rest = body.toLocaleLowerCase('en');
  const names = [...new Set(people.map((p) => p.name.toLocaleLowerCase('en')))].sort((a, b) => b.length - a.length);
  const said = new Set<string>();
  for (const name of names) {
    const parts = rest.split(`@${name}`);
    const isNamed = parts.slice(1).some((after) => !/^[\p{L}\p{N}]/u.test(after));
    if (!isNamed) continue;
    said.add(name);
    rest = parts.join('\n');
  }
  return people.filter((p) => said.has(p.name.toLocaleLowerCase('en')));
}

/**
 * Queues a mail to whom a new remark concerns: those it names, whose reading it is, and who wrote in the thread before;
 * never to its author, to nobody who has switched such mail off, to nobody who could not open the reading. What was
 * written is not in the mail.
 */
export async function mailAboutRemark(deps: Deps, actor: Actor, head: ReadingHead, remark: SaidRemark): Promise<void> {
  const audience = (await listAudience(deps.db, actor, head)).filter((p) => p.userId !== actor.userId && p.wantsMail);
  if (audience.length === 0) return;
  const mentioned = new Set(findMentioned(remark.body, audience).map((p) => p.userId));
  const writers = remark.threadId ? await listThreadWriters(deps.db, remark.threadId) : [];
  const link = await linkTo(deps, head, remark);
  for (const person of audience) {
    const reason = reasonFor(person, mentioned, head.ownerId, writers);
    if (reason) await queueMail(deps.db, deps.newId(), mailTo(person, actor, head, reason, link), deps.now());
  }
}

type Reason = 'mentioned' | 'answered' | 'own';

function reasonFor({ userId }: Listener, mentioned: ReadonlySet<string>, ownerId: string | null, writers: readonly string[]): Reason | null {
  if (mentioned.has(userId)) return 'mentioned';
  if (writers.includes(userId)) return 'answered';
  return userId === ownerId ? 'own' : null;
}

const OPENINGS: Readonly<Record<Reason, string>> = {
  mentioned: 'names you in a remark on',
  answered: 'answered in a thread you wrote in, on',
  own: 'wrote a remark on your reading of',
};

function mailTo({ name, email }: Listener, actor: Actor, { excerptTitle }: ReadingHead, reason: Reason, link: string) {
  const text = [
    `Dear ${name},`,
    `${actor.name} ${OPENINGS[reason]} “${excerptTitle}”:`,
    link,
    'Sign in to read and answer it. These mails can be switched off under Account.',
  ].join('\n\n');
  return { to: email, subject: `A remark on ${excerptTitle}`, text };
}

async function linkTo(deps: Deps, head: ReadingHead, { labelId }: SaidRemark): Promise<string> {
  const at = labelId ? await findLabelStart(deps.db, head.id, labelId) : null;
  return `${deps.appUrl}/desk/${head.id}?margin=remarks${at === null ? '' : `&at=${at}`}`;
}
