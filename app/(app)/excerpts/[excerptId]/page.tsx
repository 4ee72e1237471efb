import type { Metadata } from 'next';
import Link from 'next/link';
import { cache } from 'react';
import { formatBars } from '@/components/library/excerpt-progress';
import { ScoreSheet } from '@/components/library/score-sheet';
import { ButtonLink, DateText, PageHeader, Section } from '@/components/ui';
import { listCourses } from '@/db/queries/courses';
import { type ExcerptRow, type ReadingListRow, findExcerpt, listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { canChangeLibraryItem, canPrepareAssignments, canUseLibrary } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { ExcerptActions } from './_components/excerpt-actions';
import { ImportReading } from './_components/import-reading';
import { ProposalWatch } from './_components/proposal-watch';
import { ReadingTable } from './_components/reading-table';
import { StartReading } from './_components/start-reading';

interface ExcerptPageProps {
  readonly params: Promise<{ readonly excerptId: string }>;
}

/** Once for the page's title and its body. */
const getExcerpt = cache(async (excerptId: string) => {
  const actor = await requireActor(canUseLibrary);
  return { actor, excerpt: orNotFound(await findExcerpt(createDeps().db, actor, excerptId)) };
});

export async function generateMetadata({ params }: ExcerptPageProps): Promise<Metadata> {
  return { title: (await getExcerpt((await params).excerptId)).excerpt.title };
}

export default async function ExcerptPage({ params }: ExcerptPageProps) {
  const { actor, excerpt } = await getExcerpt((await params).excerptId);
  const { db } = createDeps();
  const [readings, courses] = await Promise.all([listReadingsOfExcerpts(db, actor, [excerpt.id]), listCourses(db, actor)]);
  const settable = courses.filter(({ archivedAt, courseRole }) => archivedAt === null && canPrepareAssignments(actor, courseRole));
  return (
    <div className="sheet pb-16">
      <PageHeader
        title={excerpt.title}
        subtitle={<Origin excerpt={excerpt} />}
        crumbs={[{ label: 'Library', href: '/library' }, { label: excerpt.scoreTitle, href: `/scores/${excerpt.scoreId}` }, { label: excerpt.title }]}
        actions={
          <>
            <ExcerptActions
              excerpt={excerpt}
              courses={settable.map(({ id, title }) => ({ id, title }))}
              changeable={canChangeLibraryItem(actor, { broughtBy: excerpt.createdBy })}
            />
            <WayToDesk excerptId={excerpt.id} readings={readings} ownId={actor.userId} />
          </>
        }
      />
      {excerpt.purpose ? <p className="measure mb-6 font-book text-lead">{excerpt.purpose}</p> : null}
      <Section title="Readings" aside={<>cut <DateText date={excerpt.createdAt} /> by {excerpt.creatorName}</>}>
        {readings.some(({ state }) => state === 'proposing') ? <ProposalWatch excerptId={excerpt.id} /> : null}
        <ReadingTable excerptId={excerpt.id} excerptTitle={excerpt.title} readings={readings} ownId={actor.userId} />
        <div className="mt-4">
          <ImportReading excerptId={excerpt.id} scoreId={excerpt.scoreId} span={{ firstBar: excerpt.firstBar, lastBar: excerpt.lastBar }} />
        </div>
      </Section>
      <Section title="The passage">
        <ScoreSheet fileUrl={`/api/scores/${excerpt.scoreId}/file`} shown={{ first: excerpt.firstBar, last: excerpt.lastBar }} range={null} />
      </Section>
    </div>
  );
}

function Origin({ excerpt }: { readonly excerpt: ExcerptRow }) {
  const first = { index: excerpt.firstBar, number: excerpt.bars?.[excerpt.firstBar]?.number ?? '' };
  const last = { index: excerpt.lastBar, number: excerpt.bars?.[excerpt.lastBar]?.number ?? '' };
  return (
    <>
      {first.index === last.index ? 'Bar' : 'Bars'} {formatBars(first, last)} of{' '}
      <Link href={`/scores/${excerpt.scoreId}`} className="link">{excerpt.scoreTitle}</Link>
      {excerpt.composer ? `, ${excerpt.composer}` : ''}
    </>
  );
}

interface WayToDeskProps {
  readonly excerptId: string;
  readonly readings: readonly ReadingListRow[];
  readonly ownId: string;
}

/** The one thing most people come for: their own reading, or the start of it. */
function WayToDesk({ excerptId, readings, ownId }: WayToDeskProps) {
  const own = readings.filter(({ kind, ownerId }) => kind === 'person' && ownerId === ownId).at(-1);
  if (own) return <ButtonLink kind="primary" href={`/desk/${own.id}`}>Open my reading</ButtonLink>;
  const hasProposal = readings.some(({ kind, state }) => kind === 'engine' && state === 'open');
  return hasProposal ? <StartReading kind="primary" excerptId={excerptId}>Start my reading</StartReading> : null;
}
