'use client';

import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { type LoadedScore, useScore } from '@/components/reading/use-score';
import { KeyName, NumeralText } from '@/components/score/numeral-text';
import { Button, Choices, Dialog, DialogActions, ErrorNote, Radio, Row, Spinner, Table, Td, Th } from '@/components/ui';
import type { Annotation } from '@/lib/score/annotation';
import { ANALYSIS_SOURCES, type AnalysisSource, type UnreadLabel, importAnalysis } from '@/lib/score/import-analysis';
import type { Bar } from '@/lib/score/score';
import { equalKeys } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';
import { importReadingAction } from '../actions';

interface ImportReadingProps {
  readonly excerptId: string;
  readonly scoreId: string;
  readonly span: { readonly firstBar: number; readonly lastBar: number };
}

/** Offers the analysis that the uploaded file itself carries as a reading of one's own. */
export function ImportReading(props: ImportReadingProps) {
  const [shown, setShown] = useState(false);
  return (
    <>
      <Button onClick={() => setShown(true)}>Use the file’s own analysis</Button>
      <Dialog
        wide
        open={shown}
        onOpenChange={setShown}
        title="The file’s own analysis"
        description="Chord symbols, figured bass or numerals under the notes, as they stand in the uploaded file, become a reading of yours. The file is not changed."
      >
        <Look {...props} onLeave={() => setShown(false)} />
      </Dialog>
    </>
  );
}

const NAMES: Readonly<Record<AnalysisSource, string>> = {
  harmony: 'Harmony: numerals or chord symbols',
  'figured-bass': 'Figured bass, read as chords of the key signature',
  lyrics: 'Numerals written as lyrics',
};

interface LookProps extends ImportReadingProps {
  readonly onLeave: () => void;
}

function Look({ scoreId, ...rest }: LookProps) {
  const { loaded, retry } = useScore(`/api/scores/${scoreId}/file`);
  if (loaded.state === 'loading') return <p role="status" className="flex items-center gap-2 py-8 text-ink-soft"><Spinner label="" /> Looking into the file</p>;
  if (loaded.state === 'failed') {
    return <ErrorNote title="The file cannot be read" action={<Button size="small" onClick={retry}>Try again</Button>}>{loaded.message}</ErrorNote>;
  }
  return <Choose {...rest} loaded={loaded} />;
}

interface WrittenLabels {
  readonly source: AnalysisSource;
  readonly bars: readonly { readonly bar: Bar; readonly labels: readonly Annotation[] }[];
  readonly count: number;
  readonly unread: readonly UnreadLabel[];
}

/** What each source holds within the excerpt; sources without a label there are left out. */
function findWrittenLabels({ xml, score }: Extract<LoadedScore, { state: 'ready' }>, { firstBar, lastBar }: ImportReadingProps['span']): WrittenLabels[] {
  const inside = score.bars.slice(firstBar, lastBar + 1);
  const numbers = new Set(inside.map(({ number }) => number));
  return ANALYSIS_SOURCES.flatMap((source) => {
    const imported = importAnalysis(xml, source);
    if (!imported.ok) return [];
    const { annotations, unread } = imported.value;
    const bars = inside
      .map((bar) => ({ bar, labels: annotations.filter(({ start }) => start >= bar.start && start < bar.start + bar.length) }))
      .filter(({ labels }) => labels.length > 0);
    const count = bars.reduce((sum, { labels }) => sum + labels.length, 0);
    return count > 0 ? [{ source, bars, count, unread: unread.filter(({ bar }) => numbers.has(bar)) }] : [];
  });
}

interface ChooseProps {
  readonly excerptId: string;
  readonly span: ImportReadingProps['span'];
  readonly loaded: Extract<LoadedScore, { state: 'ready' }>;
  readonly onLeave: () => void;
}

function Choose({ excerptId, span, loaded, onLeave }: ChooseProps) {
  const router = useRouter();
  const { firstBar, lastBar } = span;
  const found = useMemo(() => findWrittenLabels(loaded, { firstBar, lastBar }), [loaded, firstBar, lastBar]);
  const [picked, setPicked] = useState<AnalysisSource | null>(null);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const chosen = found.find(({ source }) => source === picked) ?? found[0];
  if (!chosen) {
    return (
      <>
        <p>In these bars the file holds no harmony elements, no figured bass and no numerals among its lyrics.</p>
        <DialogActions><Button onClick={onLeave}>Back</Button></DialogActions>
      </>
    );
  }
  const take = async () => {
    setBusy(true);
    const answer = await importReadingAction({ excerptId, source: chosen.source }).catch(() => null);
    if (answer?.ok) return router.push(`/desk/${answer.value.readingId}`);
    setBusy(false);
    return setProblem(answer ? answer.error.message : 'The server cannot be reached. Try again.');
  };
  return (
    <div className="flex flex-col gap-4">
      {problem ? <ErrorNote>{problem}</ErrorNote> : null}
      <Choices legend="What to take over">
        {found.map(({ source, count }) => (
          <Radio
            key={source}
            name="source"
            value={source}
            checked={source === chosen.source}
            onChange={() => setPicked(source)}
            label={NAMES[source]}
            hint={count === 1 ? '1 label in these bars' : `${count} labels in these bars`}
          />
        ))}
      </Choices>
      <Preview written={chosen} />
      {chosen.unread.length > 0 ? <Unread labels={chosen.unread} /> : null}
      <DialogActions>
        <Button onClick={onLeave}>Leave it</Button>
        <Button kind="primary" busy={busy} busyText="Taking over" onClick={() => void take()}>Make it a reading</Button>
      </DialogActions>
    </div>
  );
}

function Preview({ written }: { readonly written: WrittenLabels }) {
  const all = written.bars.flatMap(({ labels }) => labels);
  return (
    <div className="max-h-72 overflow-y-auto border-y border-rule">
      <Table caption="What was read, bar by bar">
        <thead><Row><Th>Bar</Th><Th>Labels</Th></Row></thead>
        <tbody>
          {written.bars.map(({ bar, labels }) => (
            <Row key={bar.index}>
              <Th scope="row" className="tabular w-16">{bar.number || '·'}</Th>
              <Td>
                {labels.map((label) => <WrittenLabel key={label.start} label={label} before={all[all.indexOf(label) - 1]} />)}
              </Td>
            </Row>
          ))}
        </tbody>
      </Table>
    </div>
  );
}

/** The key stands before the numeral where it is new. */
function WrittenLabel({ label, before }: { readonly label: Annotation; readonly before: Annotation | undefined }) {
  const isNew = !before || !equalKeys(before.key, label.key);
  return (
    <span className="mr-5 whitespace-nowrap">
      {isNew ? <span className="mr-1.5 text-ink-soft"><KeyName keyValue={label.key} />:</span> : null}
      {label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode)} className="text-lead" /> : <span className="text-ink-soft">no chord</span>}
    </span>
  );
}

function Unread({ labels }: { readonly labels: readonly UnreadLabel[] }) {
  return (
    <details>
      <summary className="link w-fit text-ochre">{labels.length === 1 ? 'One label could not be read' : `${labels.length} labels could not be read`}</summary>
      <ul className="mt-1 list-disc pl-5 text-small">
        {labels.map(({ bar, text }, place) => <li key={place}>Bar {bar || 'without a number'}: {text || 'nothing printed'}</li>)}
      </ul>
      <p className="text-small text-ink-soft">The label before each goes on over it. You can write it in at the desk.</p>
    </details>
  );
}
