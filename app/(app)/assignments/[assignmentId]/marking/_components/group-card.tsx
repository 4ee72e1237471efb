'use client';

import { type KeyboardEvent, useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { ChordName } from '@/components/marking/chord-name';
import { VerdictMark } from '@/components/marking/verdict-mark';
import { Button, Mark, classNames } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { accept } from '../../../actions';
import { MarkEditor } from './mark-editor';
import type { AnswerView, GroupView, MarkedAssignment, QuestionView } from './marking-views';

interface GroupCardProps {
  readonly assignment: MarkedAssignment;
  readonly question: QuestionView;
  readonly group: GroupView;
  readonly remarks: readonly string[];
  readonly mayChangeKey: boolean;
  readonly tabbable: boolean;
  onFocus(): void;
  onKeyDown(event: KeyboardEvent<HTMLElement>): void;
  onSettle(): void;
}

/** Students who wrote the same: one verdict for all of them, or one by one. */
export function GroupCard(props: GroupCardProps) {
  const { assignment, question, group, tabbable, onFocus, onKeyDown } = props;
  const [single, setSingle] = useState<string | null>(null);
  const [open, setOpen] = useState(false);
  const [first] = group.answers;
  if (!first) return null;
  const isSettled = group.answers.every((one) => one.settled);
  const chosen = group.answers.find((one) => one.submissionId === single);
  return (
    <li
      data-group
      tabIndex={tabbable ? 0 : -1}
      aria-label={`${countOf(group)}, ${formatPoints(first.points)} of ${formatPoints(first.maxPoints)} points`}
      onFocus={(event) => event.target === event.currentTarget && onFocus()}
      onKeyDown={onKeyDown}
      className={classNames('border bg-sheet px-3 py-2 sm:px-4', isSettled ? 'border-rule' : 'border-rule-strong')}
    >
      <GroupHead {...props} first={first} settled={isSettled} />
      {first.proposed.reasons.length > 0 ? <p className="mt-1 text-small text-ink-soft">{first.proposed.reasons.join(' ')}</p> : null}
      {open ? <Names group={group} single={single} onSingle={setSingle} /> : null}
      <MarkEditor
        key={single ?? 'all'}
        assignmentId={assignment.id}
        start={question.start}
        answers={chosen ? [chosen] : group.answers}
        pointStep={assignment.pointStep}
        remarks={props.remarks}
        whose={chosen ? chosen.studentName : group.answers.length === 1 ? first.studentName : 'all of them'}
      >
        <button type="button" className="link min-h-6 text-small" aria-expanded={open} onClick={() => { setOpen(!open); setSingle(null); }}>{open ? 'Hide the names' : 'Whose'}</button>
      </MarkEditor>
    </li>
  );
}

function countOf(group: GroupView): string {
  return group.answers.length === 1 ? '1 student' : `${group.answers.length} students`;
}

function GroupHead({ assignment, question, group, mayChangeKey, onSettle, first, settled }: GroupCardProps & { readonly first: AnswerView; readonly settled: boolean }) {
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  const verdicts = new Set(group.answers.map((one) => one.verdict));
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
      <p className="flex min-w-24 flex-wrap items-baseline gap-x-2 text-title">
        {first.answer.map((piece, i) => (piece.chord ? <ChordName key={i} chord={piece.chord} sheet={sheet} keyShown={!assignment.keysGiven} /> : <span key={i} className="text-base text-ink-soft italic">blank</span>))}
      </p>
      <span className="text-small text-ink-soft">{countOf(group)}</span>
      {verdicts.size === 1 ? <VerdictMark verdict={first.verdict} /> : <span className="text-ink-soft">marked one by one</span>}
      {group.answers.some((one) => one.overridden) ? <span className="text-small text-ink-soft">changed by hand</span> : null}
      <span className="ml-auto flex items-center gap-2">
        {mayChangeKey ? <TakeAsRight assignment={assignment} question={question} answer={first} /> : null}
        {settled ? <Mark tone="settled" shape="check">looked at</Mark> : <Button size="small" kind="primary" onClick={onSettle}>Settle</Button>}
      </span>
    </div>
  );
}

/** Adds the answer to the key's alternatives; the page then shows what changes for whom before anything does. */
function TakeAsRight({ assignment, question, answer }: { readonly assignment: MarkedAssignment; readonly question: QuestionView; readonly answer: AnswerView }) {
  const [busy, act] = useAct();
  const [piece] = answer.answer;
  const isCandidate = answer.answer.length === 1 && piece?.chord && (answer.proposed.verdict === 'partly' || answer.proposed.verdict === 'not-this');
  if (!isCandidate || !piece?.chord) return null;
  const { chord } = piece;
  return (
    <Button
      size="small"
      kind="quiet"
      busy={busy}
      onClick={() => void act(() => accept({ assignmentId: assignment.id, startTick: question.start, chord }), 'The key takes this too now. See above what changes.')}
    >
      Accept as right
    </Button>
  );
}

function Names({ group, single, onSingle }: { readonly group: GroupView; readonly single: string | null; onSingle(submissionId: string | null): void }) {
  return (
    <ul aria-label="Mark one of them alone" className="mt-2 flex flex-wrap gap-1.5">
      {group.answers.map((one) => (
        <li key={one.submissionId}>
          <Button size="small" kind={one.submissionId === single ? 'primary' : 'plain'} aria-pressed={one.submissionId === single} onClick={() => onSingle(one.submissionId === single ? null : one.submissionId)}>
            {one.studentName}
            {one.overridden ? <span className="tabular">{formatPoints(one.points)}</span> : null}
          </Button>
        </li>
      ))}
    </ul>
  );
}
