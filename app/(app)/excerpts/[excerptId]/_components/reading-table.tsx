import { DownloadMenu } from '@/components/library/download-menu';
import { progressOfReading } from '@/components/library/excerpt-progress';
import { ButtonLink, DateText, Progress, Row, StateMark, Table, Tag, Td, Th } from '@/components/ui';
import type { ReadingListRow } from '@/db/queries/excerpts';
import { MakeKey } from './make-key';
import { ProposeAgain, StartReading } from './start-reading';

interface ReadingTableProps {
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly readings: readonly ReadingListRow[];
  readonly ownId: string;
}

/** The proposal, people's readings and keys, each with how far it is and where it leads. */
export function ReadingTable({ excerptId, excerptTitle, readings, ownId }: ReadingTableProps) {
  return (
    <Table caption="Readings of this excerpt">
      <thead>
        <Row>
          <Th>Reading</Th>
          <Th>Settled</Th>
          <Th className="hidden md:table-cell">Last change</Th>
          <Th className="hidden sm:table-cell"><span className="sr-only">Actions</span></Th>
        </Row>
      </thead>
      <tbody>
        {readings.map((reading) => (
          <Row key={reading.id}>
            <Th scope="row">
              <ReadingName reading={reading} isOwn={reading.ownerId === ownId} />
              <div className="mt-1.5 font-normal sm:hidden"><ReadingActions excerptId={excerptId} excerptTitle={excerptTitle} reading={reading} ownId={ownId} /></div>
            </Th>
            <Td><Settled reading={reading} /></Td>
            <Td className="hidden text-small text-ink-soft md:table-cell"><DateText date={reading.updatedAt} withTime /></Td>
            <Td className="hidden py-1.5 sm:table-cell"><ReadingActions excerptId={excerptId} excerptTitle={excerptTitle} reading={reading} ownId={ownId} /></Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function ReadingName({ reading, isOwn }: { readonly reading: ReadingListRow; readonly isOwn: boolean }) {
  const who = reading.kind === 'engine' ? 'worked out by the program' : isOwn ? sharedWords(reading) : (reading.ownerName ?? 'someone who has left');
  return (
    <>
      <span className="font-book text-lead leading-tight font-medium">{reading.title}</span>
      {reading.kind === 'key' ? <Tag className="ml-2">Key</Tag> : null}
      <p className="text-small font-normal text-ink-soft">{who}</p>
    </>
  );
}

function sharedWords({ shared }: ReadingListRow): string {
  if (shared === 'edit') return 'yours, colleagues may edit';
  return shared === 'comment' ? 'yours, colleagues may remark' : 'yours, seen by nobody else';
}

function Settled({ reading }: { readonly reading: ReadingListRow }) {
  const { mark, words } = progressOfReading(reading);
  const isPersons = reading.kind !== 'engine' && reading.labelCount > 0;
  return (
    <div className="max-w-52">
      <StateMark state={mark}>{words}</StateMark>
      {isPersons ? <Progress className="mt-1" value={reading.settledCount} max={reading.labelCount} label={`Labels settled in ${reading.title}`} /> : null}
    </div>
  );
}

interface ReadingActionsProps {
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly reading: ReadingListRow;
  readonly ownId: string;
}

function ReadingActions({ excerptId, excerptTitle, reading, ownId }: ReadingActionsProps) {
  const { id, title, kind, state, labelCount, settledCount, ownerId } = reading;
  if (state === 'proposing') return null;
  if (state === 'failed') return <ProposeAgain excerptId={excerptId} />;
  return (
    <div className="flex flex-wrap gap-1.5 sm:justify-end">
      {ownerId === ownId ? null : <StartReading small excerptId={excerptId} basedOn={id}>Start mine from this</StartReading>}
      {kind === 'person' ? <MakeKey excerptId={excerptId} excerptTitle={excerptTitle} reading={{ id, title, open: labelCount - settledCount }} /> : null}
      <DownloadMenu readingId={id} title={title} />
      <ButtonLink size="small" href={`/handouts/${id}`} aria-label={`Hand out: ${title}`}>Hand out</ButtonLink>
      <ButtonLink size="small" href={`/desk/${id}`} aria-label={`Open at the desk: ${title}`}>Desk</ButtonLink>
    </div>
  );
}
