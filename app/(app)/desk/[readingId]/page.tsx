import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { Tag } from '@/components/ui';
import { Desk } from '@/components/reading/desk';
import { type ReadingHead, findReading } from '@/db/queries/readings';
import { findOwnSubmissionOfReading } from '@/db/queries/reading-submissions';
import type { Actor } from '@/lib/auth/actor';
import { canEditReading, canUseLibrary } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { loadReading } from '@/lib/workflows/read-reading';
import { DeskActions } from './_components/desk-actions';
import { ProposingNote } from './_components/proposing-note';

interface DeskPageProps {
  readonly params: Promise<{ readonly readingId: string }>;
  readonly searchParams: Promise<{ readonly at?: string }>;
}

async function getHead(actor: Actor, readingId: string): Promise<ReadingHead> {
  const deps = createDeps();
  return orNotFound(await findReading(deps.db, actor, readingId, deps.now()));
}

export async function generateMetadata({ params }: DeskPageProps): Promise<Metadata> {
  const actor = await requireActor();
  const head = await getHead(actor, (await params).readingId);
  return { title: `${head.excerptTitle} · ${head.title}` };
}

export default async function DeskPage({ params, searchParams }: DeskPageProps) {
  const actor = await requireActor();
  const { readingId } = await params;
  const at = Number((await searchParams).at);
  const head = await getHead(actor, readingId);
  const submissionId = head.kind === 'submission' ? await findOwnSubmissionOfReading(createDeps().db, actor, readingId) : null;
  if (submissionId) redirect(`/submissions/${submissionId}`);
  if (head.state === 'proposing' || head.state === 'failed') return <ProposingNote readingId={readingId} state={head.state} title={head.excerptTitle} />;
  const reading = await loadReading(createDeps(), actor, head);
  const base = `/api/readings/${readingId}`;
  return (
    <div className="h-[calc(100dvh-var(--spacing-header))]">
      <Desk
        base={base}
        scoreUrl={`${base}/score`}
        mode={canEditReading(actor, head.access) ? 'edit' : 'read'}
        userId={actor.userId}
        firstBar={head.firstBar}
        lastBar={head.lastBar}
        reading={reading}
        version={head.version}
        heading={<Heading head={head} actor={actor} />}
        actions={<DeskActions readingId={readingId} excerptId={head.excerptId} staff={canUseLibrary(actor)} editable={canEditReading(actor, head.access)} />}
        {...(Number.isFinite(at) ? { openAt: at } : {})}
      />
    </div>
  );
}

function Heading({ head, actor }: { readonly head: ReadingHead; readonly actor: Actor }) {
  const whose = head.kind === 'engine' ? 'proposal' : head.ownerId === actor.userId ? null : head.ownerName;
  return (
    <span className="flex min-w-0 items-baseline gap-2">
      <Link href={`/excerpts/${head.excerptId}`} className="truncate font-book text-lead no-underline hover:underline">{head.excerptTitle}</Link>
      <span className="truncate text-small text-ink-soft">{head.title}</span>
      {whose ? <Tag>{whose}</Tag> : null}
      {head.kind === 'key' ? <Tag>answer key</Tag> : null}
    </span>
  );
}
