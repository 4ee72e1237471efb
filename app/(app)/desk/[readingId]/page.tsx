import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import { preload } from 'react-dom';
import { Tag } from '@/components/ui';
import { Desk } from '@/components/reading/desk';
import { type ReadingHead, findReading } from '@/db/queries/readings';
import { listCourses } from '@/db/queries/courses';
import { listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { findCourseOfKey, findOwnSubmissionOfReading } from '@/db/queries/reading-submissions';
import type { Actor } from '@/lib/auth/actor';
import { canEditReading, canUseLibrary } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { loadReading } from '@/lib/workflows/read-reading';
import { DeskActions } from './_components/desk-actions';
import { ProposingNote } from './_components/proposing-note';
import { listSpellings } from './_components/spellings';

interface DeskPageProps {
  readonly params: Promise<{ readonly readingId: string }>;
  readonly searchParams: Promise<{ readonly at?: string; readonly beside?: string; readonly margin?: string; readonly bar?: string }>;
}

/** Once for the page's title and its body. */
const getOwnHead = cache(async (readingId: string) => {
  const actor = await requireActor();
  return { actor, head: await getHead(actor, readingId) };
});

async function getHead(actor: Actor, readingId: string): Promise<ReadingHead> {
  const deps = createDeps();
  return orNotFound(await findReading(deps.db, actor, readingId, deps.now()));
}

export async function generateMetadata({ params }: DeskPageProps): Promise<Metadata> {
  const { head } = await getOwnHead((await params).readingId);
  return { title: `${head.excerptTitle} · ${head.title}` };
}

export default async function DeskPage({ params, searchParams }: DeskPageProps) {
  const { readingId } = await params;
  const { actor, head } = await getOwnHead(readingId);
  const { at: atText, beside: besideId, margin, bar } = await searchParams;
  const at = Number(atText);
  const submissionId = head.kind === 'submission' ? await findOwnSubmissionOfReading(createDeps().db, actor, readingId) : null;
  if (submissionId) redirect(`/submissions/${submissionId}`);
  if (head.state === 'proposing' || head.state === 'failed') return <ProposingNote readingId={readingId} state={head.state} title={head.excerptTitle} />;
  const base = `/api/readings/${readingId}`;
  // The browser fetches it beside the scripts; the desk's own fetch finds it there.
  preload(`${base}/score`, { as: 'fetch', crossOrigin: 'anonymous' });
  const { db } = createDeps();
  const [reading, readings, courses, courseId] = await Promise.all([
    loadReading(createDeps(), actor, head),
    canUseLibrary(actor) ? listReadingsOfExcerpts(db, actor, [head.excerptId]) : [],
    listCourses(db, actor),
    head.kind === 'key' ? findCourseOfKey(db, actor, readingId) : null,
  ]);
  const others = readings.filter((r) => r.id !== readingId && r.state !== 'proposing' && r.state !== 'failed').map((r) => ({ id: r.id, title: r.title, by: nameOwner(actor, r) }));
  const chosen = others.find((r) => r.id === besideId);
  const beside = chosen && (await loadBeside(actor, chosen));
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
        actions={<DeskActions readingId={readingId} others={others} besideId={chosen?.id ?? null} staff={canUseLibrary(actor)} editable={canEditReading(actor, head.access)} />}
        key={chosen?.id ?? 'alone'}
        spellings={listSpellings(courses)}
        courseId={courseId}
        {...(beside ? { beside } : {})}
        {...(bar ? { openBar: bar } : {})}
        {...(margin === 'remarks' ? { openPage: margin } : {})}
        {...(Number.isFinite(at) ? { openAt: at } : {})}
      />
    </div>
  );
}

/** Whose a reading is, for the one who looks. */
function nameOwner(actor: Actor, { kind, ownerId, ownerName }: { readonly kind: string; readonly ownerId: string | null; readonly ownerName: string | null }): string {
  if (kind === 'engine') return 'the proposal';
  return ownerId === actor.userId ? 'yours' : (ownerName ?? 'a former member');
}

async function loadBeside(actor: Actor, { id, title, by }: { readonly id: string; readonly title: string; readonly by: string }) {
  const head = await getHead(actor, id);
  return { title, by, reading: await loadReading(createDeps(), actor, head) };
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
