import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { ButtonLink, DateText, EmptyState, ErrorNote, PageHeader, Wordmark, classNames } from '@/components/ui';
import { messageOf } from '@/lib/errors';
import { type MailSink, type SunkMail, readMailSink } from '@/lib/workflows/read-mail-sink';
import { MailText } from './_components/mail-text';

export const metadata: Metadata = { title: 'Mail sink' };
export const dynamic = 'force-dynamic';

interface MailSinkPageProps {
  readonly searchParams: Promise<{ readonly to?: string; readonly mail?: string }>;
}

/** Mails of a development or demo installation, which go nowhere else. It does not exist where mails are really sent. */
export default async function MailSinkPage({ searchParams }: MailSinkPageProps) {
  const { to, mail: mailId } = await searchParams;
  const sink = await readMailSink(to ?? null);
  if (!sink.ok && sink.error.code === 'not_found') notFound();
  return (
    <main className="sheet pb-16">
      <div className="pt-6">
        <Link href="/" className="no-underline" aria-label="To the start"><Wordmark small /></Link>
      </div>
      <PageHeader
        title="Mail sink"
        subtitle={to ? <>What was sent to {to}</> : 'What this installation sent. None of it left this machine.'}
        actions={<Actions filtered={to !== undefined} />}
      />
      {sink.ok ? <Mails sink={sink.value} mailId={mailId} to={to} /> : <ErrorNote title="No mails to show">{messageOf(sink.error)}</ErrorNote>}
    </main>
  );
}

function Actions({ filtered }: { readonly filtered: boolean }) {
  return (
    <>
      {filtered ? <ButtonLink href="/mail-sink" kind="quiet">All mails</ButtonLink> : null}
      <ButtonLink href="/mail-sink" prefetch={false}>Look again</ButtonLink>
    </>
  );
}

interface MailsProps {
  readonly sink: MailSink;
  readonly mailId: string | undefined;
  readonly to: string | undefined;
}

function Mails({ sink: { mails, appUrl }, mailId, to }: MailsProps) {
  const open = mails.find((mail) => mail.id === mailId) ?? mails[0];
  if (!open) {
    return (
      <EmptyState title="No mail yet">
        Ask for a sign-in link, invite somebody or release marks: the mail arrives here within a second or two. Then look again.
      </EmptyState>
    );
  }
  return (
    <div className="grid gap-x-10 gap-y-8 md:grid-cols-[20rem_minmax(0,1fr)]">
      <nav aria-label="Mails, newest first" className="max-h-72 overflow-y-auto md:max-h-[calc(100dvh-14rem)]">
        <ol>{mails.map((mail) => <MailLine key={mail.id} mail={mail} isOpen={mail === open} to={to} />)}</ol>
      </nav>
      <OpenMail mail={open} appUrl={appUrl} />
    </div>
  );
}

function MailLine({ mail, isOpen, to }: { readonly mail: SunkMail; readonly isOpen: boolean; readonly to: string | undefined }) {
  const query = new URLSearchParams({ ...(to ? { to } : {}), mail: mail.id });
  return (
    <li className="border-t border-rule first:border-t-0">
      <Link
        href={`/mail-sink?${query}`}
        prefetch={false}
        aria-current={isOpen ? 'true' : undefined}
        className={classNames('block border-l-2 px-3 py-2 no-underline', isOpen ? 'border-ink bg-bench' : 'border-transparent hover:bg-bench')}
      >
        <span className="block truncate font-medium">{mail.subject || 'Without a subject'}</span>
        <span className="flex justify-between gap-3 text-small text-ink-soft">
          <span className="truncate">{mail.to.join(', ')}</span>
          <DateText date={mail.receivedAt} withTime />
        </span>
      </Link>
    </li>
  );
}

function OpenMail({ mail, appUrl }: { readonly mail: SunkMail; readonly appUrl: string }) {
  return (
    <article aria-label="The open mail" className="plate min-w-0 bg-sheet px-5 py-5 sm:px-8">
      <h2 className="text-title break-words">{mail.subject || 'Without a subject'}</h2>
      <p className="mt-1 border-b border-rule pb-3 text-small text-ink-soft">
        From {mail.from} to {mail.to.join(', ')} · <DateText date={mail.receivedAt} withTime />
      </p>
      <MailText text={mail.text} appUrl={appUrl} />
    </article>
  );
}
