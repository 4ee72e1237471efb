'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, Progress, Tabs } from '@/components/ui';
import type { MarkChange } from '@/lib/workflows/mark-again';
import { settle } from '../../../../submissions/actions';
import { ByQuestion } from './by-question';
import { ByStudent } from './by-student';
import { MarkAgain } from './mark-again';
import type { MarkedAssignment, QuestionView, StudentView } from './marking-views';
import { ReleaseMarks } from './release-marks';

interface MarkingBoardProps {
  readonly assignment: MarkedAssignment;
  readonly keyReadingId: string;
  readonly questions: readonly QuestionView[];
  readonly students: readonly StudentView[];
  readonly remarks: readonly string[];
  readonly changes: readonly MarkChange[];
  readonly mayRelease: boolean;
  readonly mayChangeKey: boolean;
  /** A submission to open by student. */
  readonly opened: string | null;
}

/** Marking: what is done and what is left, by question or by student, and the release. */
export function MarkingBoard(props: MarkingBoardProps) {
  const { assignment, questions, students, changes, remarks } = props;
  const [view, setView] = useState(props.opened ? 'students' : 'questions');
  const settled = questions.reduce((sum, question) => sum + question.settled, 0);
  const total = questions.reduce((sum, question) => sum + question.total, 0);
  return (
    <div className="flex flex-col gap-5">
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div className="min-w-64 flex-1">
          <p className="mb-1.5" aria-live="polite"><strong className="tabular font-medium">{settled}</strong> of <span className="tabular">{total}</span> answers looked at</p>
          <Progress value={settled} max={total} label="Answers looked at" />
        </div>
        <div className="flex flex-wrap gap-2">
          <SettleRight assignmentId={assignment.id} questions={questions} />
          {props.mayRelease ? <ReleaseMarks assignmentId={assignment.id} students={students} /> : null}
        </div>
      </div>
      {changes.length > 0 ? <MarkAgain assignment={assignment} changes={changes} /> : null}
      <Tabs
        label="Marking"
        value={view}
        onValueChange={setView}
        tabs={[
          { value: 'questions', label: `By question (${questions.length})`, content: <ByQuestion assignment={assignment} questions={questions} remarks={remarks} mayChangeKey={props.mayChangeKey} /> },
          { value: 'students', label: `By student (${students.length})`, content: <ByStudent assignment={assignment} students={students} remarks={remarks} opened={props.opened} /> },
        ]}
      />
    </div>
  );
}

/** What is as keyed, or accepted already, seldom needs a look. */
function SettleRight({ assignmentId, questions }: { readonly assignmentId: string; readonly questions: readonly QuestionView[] }) {
  const [busy, act] = useAct();
  const open = questions.flatMap(({ start, groups }) => {
    const ids = groups.flatMap((group) => group.answers).filter((one) => !one.settled && (one.verdict === 'as-keyed' || one.verdict === 'alternative')).map((one) => one.submissionId);
    return ids.length > 0 ? [{ startTick: start, submissionIds: ids }] : [];
  });
  const count = open.reduce((sum, one) => sum + one.submissionIds.length, 0);
  if (count === 0) return null;
  return (
    <Button busy={busy} onClick={() => void act(() => settle({ assignmentId, answers: open, settled: true }), `${count} right answers are settled.`)}>
      Settle the {count} right ones
    </Button>
  );
}
