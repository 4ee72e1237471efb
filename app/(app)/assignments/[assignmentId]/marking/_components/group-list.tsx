'use client';

import { type KeyboardEvent, useRef, useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { override, settle } from '../../../../submissions/actions';
import { GroupCard } from './group-card';
import type { GroupView, MarkedAssignment, QuestionView } from './marking-views';
import { stepPoints } from './step-points';

interface GroupListProps {
  readonly assignment: MarkedAssignment;
  readonly question: QuestionView;
  readonly remarks: readonly string[];
  readonly mayChangeKey: boolean;
  /** After the last group. */
  onOnward(): void;
  onQuestion(step: number): void;
}

/**
 * The groups of one question. Keys, while a group has the focus: ↑ ↓ the next group, Enter settles it and goes on,
 * + and − change its points by a step, Backspace takes the proposal again, ← → the next question.
 */
export function GroupList({ assignment, question, remarks, mayChangeKey, onOnward, onQuestion }: GroupListProps) {
  const [at, setAt] = useState(0);
  const list = useRef<HTMLOListElement>(null);
  const [, act] = useAct();
  const { groups, start } = question;
  const focus = (place: number) => {
    const next = Math.min(groups.length - 1, Math.max(0, place));
    setAt(next);
    list.current?.querySelectorAll<HTMLElement>('[data-group]')[next]?.focus();
  };
  const target = (group: GroupView) => ({ assignmentId: assignment.id, startTick: start, submissionIds: group.answers.map((one) => one.submissionId) });
  const settleGroup = async (group: GroupView, place: number) => {
    const { startTick, submissionIds } = target(group);
    const done = await act(() => settle({ assignmentId: assignment.id, answers: [{ startTick, submissionIds }], settled: true }), 'Settled.');
    if (!done) return;
    if (place + 1 < groups.length) focus(place + 1);
    else onOnward();
  };
  const onKeyDown = (event: KeyboardEvent<HTMLElement>, group: GroupView, place: number) => {
    if (event.target !== event.currentTarget || event.ctrlKey || event.metaKey || event.altKey) return;
    const points = group.answers[0]?.points ?? 0;
    const keys: Readonly<Record<string, () => void>> = {
      ArrowDown: () => focus(place + 1),
      ArrowUp: () => focus(place - 1),
      ArrowRight: () => onQuestion(1),
      ArrowLeft: () => onQuestion(-1),
      Enter: () => void settleGroup(group, place),
      '+': () => void act(() => override({ ...target(group), points: stepPoints(points, 1, assignment.pointStep, question.maxPoints), verdict: null }), 'Points changed.'),
      '-': () => void act(() => override({ ...target(group), points: stepPoints(points, -1, assignment.pointStep, question.maxPoints), verdict: null }), 'Points changed.'),
      Backspace: () => void act(() => override({ ...target(group), points: null, verdict: null }), 'As proposed again.'),
    };
    const run = keys[event.key];
    if (!run) return;
    event.preventDefault();
    run();
  };
  return (
    <>
      <ol ref={list} className="flex flex-col gap-3">
        {groups.map((group, place) => (
          <GroupCard
            key={group.signature}
            assignment={assignment}
            question={question}
            group={group}
            remarks={remarks}
            mayChangeKey={mayChangeKey}
            tabbable={place === Math.min(at, groups.length - 1)}
            onFocus={() => setAt(place)}
            onKeyDown={(event) => onKeyDown(event, group, place)}
            onSettle={() => void settleGroup(group, place)}
          />
        ))}
      </ol>
      <p className="mt-3 hidden text-micro text-ink-soft md:block">
        With a group in focus: ↑ ↓ another group, ← → another question, Enter settles it and goes on, + and − change the points, Backspace takes the proposal again.
      </p>
    </>
  );
}
