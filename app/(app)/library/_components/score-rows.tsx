import Link from 'next/link';
import { KeyName } from '@/components/score/numeral-text';
import { DateText, Row, StateMark, Tag, Td, Th } from '@/components/ui';
import { formatPlace } from '@/components/library/uploads';
import type { LibraryRow } from '@/db/queries/library';
import type { ExcerptEntry } from '../entries';

interface ScoreRowsProps {
  readonly score: LibraryRow;
  readonly excerpts: readonly ExcerptEntry[];
}

/** A score, and under it the excerpts that were cut from it. */
export function ScoreRows({ score, excerpts }: ScoreRowsProps) {
  return (
    <>
      <Row className={excerpts.length > 0 ? 'border-rule-strong' : undefined}>
        <Th scope="row" className="max-w-lg">
          <Link href={`/scores/${score.id}`} className="link font-book text-lead leading-tight">{score.title}</Link>
          {score.work && score.work !== score.title ? <p className="text-small font-normal text-ink-soft">{score.work}</p> : null}
          <p className="font-normal text-ink-soft md:hidden">{score.composer}</p>
          {score.state === 'refused' && score.refusal ? <Refused refusal={score.refusal} fileName={score.fileName} /> : null}
        </Th>
        <Td className="hidden md:table-cell">{score.composer || <span className="text-ink-soft italic">unknown</span>}</Td>
        <Td className="hidden sm:table-cell">{score.keyFifths === null ? null : formatSignature(score.keyFifths)}</Td>
        <Td className="hidden pr-6 text-right tabular sm:table-cell">{score.barCount}</Td>
        <Td><ScoreMark score={score} excerptCount={excerpts.length} /></Td>
        <Td className="hidden text-small text-ink-soft lg:table-cell"><DateText date={score.createdAt} />, {score.uploaderName}</Td>
      </Row>
      {excerpts.map((excerpt) => <ExcerptRow key={excerpt.id} excerpt={excerpt} />)}
    </>
  );
}

function Refused({ refusal, fileName }: { readonly refusal: NonNullable<LibraryRow['refusal']>; readonly fileName: string }) {
  const place = formatPlace(refusal.line, refusal.element);
  return (
    <p className="measure text-small font-normal text-madder">
      {fileName}{place ? `, ${place}` : ''}: {refusal.message}
    </p>
  );
}

function ScoreMark({ score, excerptCount }: { readonly score: LibraryRow; readonly excerptCount: number }) {
  if (score.state === 'queued') return <StateMark state="waiting">waits to be read</StateMark>;
  if (score.state === 'reading') return <StateMark state="working">being read</StateMark>;
  if (score.state === 'refused') return <StateMark state="refused" />;
  if (excerptCount === 0) return <StateMark state="ready">ready to cut</StateMark>;
  return <span className="text-ink-soft">{excerptCount === 1 ? '1 excerpt' : `${excerptCount} excerpts`}</span>;
}

/** `2♯`, `3♭`, or a natural for neither. */
function formatSignature(fifths: number) {
  if (fifths === 0) return <><span aria-hidden="true">♮</span><span className="sr-only">no sharps or flats</span></>;
  const count = Math.abs(fifths);
  return (
    <>
      <span aria-hidden="true">{count}{fifths > 0 ? '♯' : '♭'}</span>
      <span className="sr-only">{count} {fifths > 0 ? 'sharps' : 'flats'}</span>
    </>
  );
}

function ExcerptRow({ excerpt }: { readonly excerpt: ExcerptEntry }) {
  return (
    <Row className="border-rule/60">
      <Th scope="row" className="max-w-lg font-normal">
        <div className="flex items-baseline gap-2 sm:pl-7">
          <Bracket />
          <div className="min-w-0">
            <Link href={`/excerpts/${excerpt.id}`} className="link">{excerpt.title}</Link>
            <span className="text-small whitespace-nowrap text-ink-soft">, bars {excerpt.bars}</span>
            {excerpt.hasSecondaryDiminished ? <Tag className="ml-2">Secondary °7</Tag> : null}
            {excerpt.purpose ? <p className="line-clamp-1 text-small text-ink-soft italic">{excerpt.purpose}</p> : null}
          </div>
        </div>
      </Th>
      <Td className="hidden md:table-cell" />
      <Td className="hidden sm:table-cell">{excerpt.key ? <KeyName keyValue={excerpt.key} className="whitespace-nowrap" /> : null}</Td>
      <Td className="hidden pr-6 text-right tabular sm:table-cell">{excerpt.barCount}</Td>
      <Td><StateMark state={excerpt.progress.mark}>{excerpt.progress.words}</StateMark></Td>
      <Td className="hidden text-small text-ink-soft lg:table-cell"><DateText date={excerpt.createdAt} />, {excerpt.creatorName}</Td>
    </Row>
  );
}

/** A bracket over some bars: cut out of the score above. */
function Bracket() {
  return (
    <svg viewBox="0 0 14 10" aria-hidden="true" className="w-3.5 shrink-0 text-rule-strong" fill="none" stroke="currentColor">
      <path d="M.5 0v5.5h13" />
    </svg>
  );
}
