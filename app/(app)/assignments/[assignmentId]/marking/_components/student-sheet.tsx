'use client';

import { useEffect, useMemo, useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { ScorePicker } from '@/components/marking/score-picker';
import { placeOf } from '@/components/marking/place-names';
import { VERDICT_LOOKS, VerdictMark } from '@/components/marking/verdict-mark';
import { fetchReading } from '@/components/reading/reading-client';
import type { LabelMark } from '@/components/score/lanes';
import { Button, ErrorNote, Skeleton } from '@/components/ui';
import type { Reading } from '@/lib/harmony/reading';
import { formatPoints } from '@/lib/marking/points';
import { VERDICT_NAMES } from '@/lib/marking/verdict';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { settle } from '../../../../submissions/actions';
import { MarkEditor } from './mark-editor';
import type { AnswerView, MarkedAssignment, StudentView } from './marking-views';

interface StudentSheetProps {
  readonly assignment: MarkedAssignment;
  readonly student: StudentView;
  readonly remarks: readonly string[];
}

type Fetched = { readonly state: 'loading' } | { readonly state: 'failed' } | { readonly state: 'ready'; readonly reading: Reading };

/** The student's labels on the score with their verdicts; the chosen one's mark beside it. */
export function StudentSheet(props: StudentSheetProps) {
  const { student } = props;
  const [fetched, setFetched] = useState<Fetched>({ state: 'loading' });
  const [turn, setTurn] = useState(0);
  useEffect(() => {
    let live = true;
    void fetchReading(`/api/readings/${student.readingId}`).then((answer) => {
      if (live) setFetched(answer ? { state: 'ready', reading: answer.reading } : { state: 'failed' });
    });
    return () => {
      live = false;
    };
  }, [student.readingId, turn]);
  if (fetched.state === 'loading') return <Skeleton className="h-72 w-full" />;
  if (fetched.state === 'failed') {
    return <ErrorNote title="This work could not be fetched" action={<Button size="small" onClick={() => setTurn(turn + 1)}>Try again</Button>}>The server did not answer.</ErrorNote>;
  }
  return <LoadedSheet {...props} reading={fetched.reading} />;
}

function LoadedSheet({ assignment, student, remarks, reading }: StudentSheetProps & { readonly reading: Reading }) {
  const [currentId, setCurrentId] = useState(reading.labels.find((label) => markAt(student, label.start))?.id ?? '');
  const [, act] = useAct();
  const marks = useMemo(() => marksOf(reading, student), [reading, student]);
  const given = useMemo(() => new Set(reading.labels.filter((label) => !markAt(student, label.start)).map((label) => label.id)), [reading, student]);
  const label = reading.labels.find((one) => one.id === currentId);
  const mark = label ? markAt(student, label.start) : undefined;
  const settleAll = () => {
    const answers = student.answers.filter((one) => !one.settled).map((one) => ({ startTick: one.start, submissionIds: [student.submissionId] }));
    void act(() => settle({ assignmentId: assignment.id, answers, settled: true }), `All of ${student.name} is settled.`);
  };
  return (
    <div className="grid gap-6 xl:grid-cols-[minmax(0,1fr)_22rem]">
      <ScorePicker
        scoreUrl={`/api/readings/${student.readingId}/score`}
        firstBar={assignment.firstBar}
        lastBar={assignment.lastBar}
        reading={reading}
        sheet={assignment.conventions ?? DEFAULT_CONVENTIONS}
        currentId={currentId}
        marks={marks}
        givenIds={given}
        say={(one) => spoken(markAt(student, one.start))}
        onSelect={setCurrentId}
      />
      <aside aria-label="The chosen label" className="flex flex-col gap-3 self-start border-t-2 border-ink pt-3">
        {mark ? <ChosenMark assignment={assignment} mark={mark} remarks={remarks} /> : <p className="text-ink-soft">Choose a label that was asked.</p>}
        {student.settled < student.answers.length ? <div><Button onClick={settleAll}>Settle all of this student</Button></div> : null}
      </aside>
    </div>
  );
}

function ChosenMark({ assignment, mark, remarks }: { readonly assignment: MarkedAssignment; readonly mark: AnswerView; readonly remarks: readonly string[] }) {
  return (
    <div>
      <p className="caps text-small text-ink-soft">{placeOf(assignment.bars, mark.start)}</p>
      <p className="my-1"><VerdictMark verdict={mark.verdict} /></p>
      {mark.proposed.reasons.map((reason) => <p key={reason} className="text-small text-ink-soft">{reason}</p>)}
      <MarkEditor key={mark.start} assignmentId={assignment.id} start={mark.start} answers={[mark]} pointStep={assignment.pointStep} remarks={remarks} whose={mark.studentName} />
    </div>
  );
}

function markAt(student: StudentView, start: number): AnswerView | undefined {
  return student.answers.find((one) => one.start <= start && start < one.end);
}

function marksOf(reading: Reading, student: StudentView): ReadonlyMap<string, LabelMark> {
  return new Map(
    reading.labels.flatMap((label): [string, LabelMark][] => {
      const mark = markAt(student, label.start);
      return mark ? [[label.id, { ...VERDICT_LOOKS[mark.verdict], note: `${formatPoints(mark.points)}/${formatPoints(mark.maxPoints)}` }]] : [];
    }),
  );
}

function spoken(mark: AnswerView | undefined): string {
  return mark ? `${VERDICT_NAMES[mark.verdict]}, ${formatPoints(mark.points)} of ${formatPoints(mark.maxPoints)} points` : 'not asked';
}
