import type { Metadata } from 'next';
import { ButtonLink, EmptyState, PageHeader } from '@/components/ui';
import { listCourses } from '@/db/queries/courses';
import { type ReadingHead, findReading } from '@/db/queries/readings';
import { findScore } from '@/db/queries/scores';
import { canUseLibrary } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { loadReading } from '@/lib/workflows/read-reading';
import { HandoutEditor } from './_components/handout-editor';

export const metadata: Metadata = { title: 'Handout' };

export default async function HandoutPage({ params }: { readonly params: Promise<{ readonly readingId: string }> }) {
  const actor = await requireActor(canUseLibrary);
  const deps = createDeps();
  const { readingId } = await params;
  const head = orNotFound(await findReading(deps.db, actor, readingId, deps.now()));
  if (head.state === 'proposing') return <NotReady head={head} />;
  const [score, courses, reading] = await Promise.all([
    findScore(deps.db, actor, head.scoreId),
    listCourses(deps.db, actor),
    loadReading(deps, actor, head),
  ]);
  const bars = (score?.bars ?? []).filter((bar) => bar.index >= head.firstBar && bar.index <= head.lastBar);
  return (
    <div className="sheet pb-16">
      <Head head={head} />
      <HandoutEditor
        readingId={head.id}
        labels={reading.labels}
        bars={bars.map(({ number, start }) => ({ number, start }))}
        courses={courses.map(({ id, title, term, conventions }) => ({ id, line: [title, term].filter(Boolean).join(' · '), conventions }))}
        texts={{
          title: head.excerptTitle,
          byline: [head.composer, score?.work].filter(Boolean).join(', '),
          source: [score?.source, score?.rights].filter(Boolean).join('. '),
        }}
      />
    </div>
  );
}

function Head({ head }: { readonly head: ReadingHead }) {
  return (
    <PageHeader
      title="Handout"
      subtitle={`${head.excerptTitle}, from ${head.ownerName ? `${head.title}` : 'the engine’s proposal'}`}
      crumbs={[
        { label: 'Library', href: '/library' },
        { label: head.scoreTitle, href: `/scores/${head.scoreId}` },
        { label: head.excerptTitle, href: `/excerpts/${head.excerptId}` },
        { label: 'Handout' },
      ]}
      actions={<ButtonLink href={`/desk/${head.id}`} kind="plain">Open at the desk</ButtonLink>}
    />
  );
}

function NotReady({ head }: { readonly head: ReadingHead }) {
  return (
    <div className="sheet pb-16">
      <Head head={head} />
      <EmptyState title="This reading is still being worked out" action={<ButtonLink href={`/excerpts/${head.excerptId}`}>Back to the excerpt</ButtonLink>}>
        A handout prints the labels of a reading. Come back when the proposal is there; it takes a few seconds.
      </EmptyState>
    </div>
  );
}
