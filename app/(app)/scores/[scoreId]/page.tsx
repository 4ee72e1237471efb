import type { Metadata } from 'next';
import Link from 'next/link';
import { cache } from 'react';
import { formatBytes } from '@/components/library/check-file';
import { formatPlace } from '@/components/library/uploads';
import { KeyName } from '@/components/score/numeral-text';
import { DateText, Facts, PageHeader, Row, Section, StateMark, Table, Td, Th, WarningNote } from '@/components/ui';
import { type ScoreRow, findScore } from '@/db/queries/scores';
import { canChangeLibraryItem, canUseLibrary } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { type ExcerptEntry, listExcerptEntries } from '../../library/entries';
import { CutExcerpt } from './_components/cut-excerpt';
import { ScoreActions } from './_components/score-actions';
import { RefusedScore, ScoreInWork } from './_components/score-in-work';

interface ScorePageProps {
  readonly params: Promise<{ readonly scoreId: string }>;
}

/** Once for the page's title and its body. */
const getScore = cache(async (scoreId: string) => {
  const actor = await requireActor(canUseLibrary);
  return { actor, score: orNotFound(await findScore(createDeps().db, actor, scoreId)) };
});

export async function generateMetadata({ params }: ScorePageProps): Promise<Metadata> {
  return { title: (await getScore((await params).scoreId)).score.title };
}

export default async function ScorePage({ params }: ScorePageProps) {
  const { actor, score } = await getScore((await params).scoreId);
  const excerpts = (await listExcerptEntries(createDeps().db, actor, [score.id])).get(score.id) ?? [];
  const { title, composer, work, source, rights } = score;
  return (
    <div className="sheet pb-16">
      <PageHeader
        title={title}
        subtitle={[composer, work === title ? '' : work].filter(Boolean).join(', ')}
        crumbs={[{ label: 'Library', href: '/library' }, { label: title }]}
        actions={<ScoreActions scoreId={score.id} words={{ title, composer, work, source, rights }} changeable={canChangeLibraryItem(actor, { broughtBy: score.uploadedBy })} />}
      />
      <div className="grid gap-x-12 lg:grid-cols-[minmax(0,1fr)_18rem]">
        <div className="min-w-0">
          <ScoreBody score={score} excerpts={excerpts} />
        </div>
        <aside aria-label="About this score" className="order-first lg:order-none">
          <Section title="Facts"><Facts facts={factsOf(score)} /></Section>
        </aside>
      </div>
    </div>
  );
}

function ScoreBody({ score, excerpts }: { readonly score: ScoreRow; readonly excerpts: readonly ExcerptEntry[] }) {
  if (score.state === 'refused') {
    const { message = '', line, element } = score.refusal ?? {};
    return <RefusedScore scoreId={score.id} fileName={score.fileName} message={message} place={formatPlace(line, element)} />;
  }
  if (score.state !== 'ready' || !score.bars) return <ScoreInWork scoreId={score.id} />;
  return (
    <>
      {score.warnings && score.warnings.length > 0 ? <Warnings warnings={score.warnings} /> : null}
      {excerpts.length > 0 ? <Excerpts excerpts={excerpts} /> : null}
      <Section title="Cut an excerpt">
        <CutExcerpt scoreId={score.id} scoreTitle={score.title} bars={score.bars.map(({ index, number }) => ({ index, number }))} />
      </Section>
    </>
  );
}

function Warnings({ warnings }: { readonly warnings: NonNullable<ScoreRow['warnings']> }) {
  return (
    <WarningNote className="mb-8" title={warnings.length === 1 ? 'The file was read, with one remark' : `The file was read, with ${warnings.length} remarks`}>
      <details>
        <summary className="link w-fit">{warnings.length === 1 ? 'Show it' : 'Show them'}</summary>
        <ul className="mt-1 list-disc pl-5">
          {warnings.map(({ code, message, line }, place) => (
            <li key={`${place} ${code}`}>{message}{line && !message.includes(`line ${line}`) ? ` (line ${line})` : ''}</li>
          ))}
        </ul>
      </details>
    </WarningNote>
  );
}

function Excerpts({ excerpts }: { readonly excerpts: readonly ExcerptEntry[] }) {
  return (
    <Section title="Excerpts" aside={excerpts.length === 1 ? '1 so far' : `${excerpts.length} so far`}>
      <Table caption="Excerpts of this score">
        <thead><Row><Th>Title</Th><Th>Bars</Th><Th>Key</Th><Th>State</Th></Row></thead>
        <tbody>
          {excerpts.map((excerpt) => (
            <Row key={excerpt.id}>
              <Th scope="row"><Link href={`/excerpts/${excerpt.id}`} className="link">{excerpt.title}</Link></Th>
              <Td className="tabular whitespace-nowrap">{excerpt.bars}</Td>
              <Td>{excerpt.key ? <KeyName keyValue={excerpt.key} className="whitespace-nowrap" /> : null}</Td>
              <Td><StateMark state={excerpt.progress.mark}>{excerpt.progress.words}</StateMark></Td>
            </Row>
          ))}
        </tbody>
      </Table>
    </Section>
  );
}

function factsOf(score: ScoreRow) {
  const { keyFifths, bars, noteCount } = score;
  return [
    ...(score.composer ? [{ term: 'Composer', value: score.composer }] : []),
    ...(score.work ? [{ term: 'Work', value: score.work }] : []),
    { term: 'Source', value: score.source },
    { term: 'Rights', value: score.rights },
    ...(bars ? [{ term: 'Bars', value: bars.length }] : []),
    ...(noteCount === null ? [] : [{ term: 'Notes', value: noteCount.toLocaleString('en-GB') }]),
    ...(keyFifths === null ? [] : [{ term: 'Signature', value: formatSignature(keyFifths) }]),
    { term: 'File', value: `${score.fileName}, ${formatBytes(score.byteSize)}` },
    { term: 'Brought in', value: <><DateText date={score.createdAt} /> by {score.uploaderName}</> },
  ];
}

function formatSignature(fifths: number): string {
  if (fifths === 0) return 'none';
  const count = Math.abs(fifths);
  return `${count} ${fifths > 0 ? 'sharp' : 'flat'}${count === 1 ? '' : 's'}`;
}
