'use client';

import { useMemo, useState } from 'react';
import { ScorePicker } from '@/components/marking/score-picker';
import { Button, Mark, WarningNote } from '@/components/ui';
import type { LabelMark } from '@/components/score/lanes';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { KeyLabel } from '@/lib/marking/key-reading';
import { formatPoints } from '@/lib/marking/points';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { EditedAssignment } from './edited-assignment';
import { QuestionDetail } from './question-detail';
import { QuestionList } from './question-list';
import { isChromatic } from './chromatic';
import { type Questions, useQuestions } from './use-questions';

interface QuestionBoardProps {
  readonly assignment: EditedAssignment;
  readonly keyLabels: readonly KeyLabel[];
  readonly reading: Reading;
  readonly keyReadingId: string;
  /** The asked spans can no longer change. */
  readonly fixed: boolean;
  readonly mayChange: boolean;
}

/** The key on the score; which of its labels are asked; each one's points and alternatives. */
export function QuestionBoard({ assignment, keyLabels, reading, keyReadingId, fixed, mayChange }: QuestionBoardProps) {
  const { questions, saving, toggle, askOnly, setPoints } = useQuestions(assignment.id, keyLabels);
  const [currentId, setCurrentId] = useState(reading.labels[0]?.id ?? '');
  const marks = useMemo(() => marksOf(reading, questions), [reading, questions]);
  const current = reading.labels.find((label) => label.id === currentId);
  const currentKey = keyLabels.find((label) => label.id === currentId);
  const withNumeral = reading.labels.filter((label) => label.numeral);
  const toggleId = (labelId: string) => {
    const label = withNumeral.find((one) => one.id === labelId);
    if (label && !fixed) toggle(label.start);
  };
  return (
    <div className="flex flex-col gap-6">
      {fixed && mayChange ? <WarningNote>Students have begun: which spans are asked is fixed. Points and alternatives can still change; marks are brought up to date under “Mark”.</WarningNote> : null}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <p aria-live="polite"><strong className="font-medium">{questions.size}</strong> of {withNumeral.length} labels asked, {formatPoints(sumOf(questions, assignment))} points{saving ? ', saving …' : ''}</p>
        <p className="flex gap-4 text-small"><Mark tone="settled" shape="disc">asked</Mark><Mark tone="plain" shape="dash">not asked</Mark></p>
        {fixed ? null : (
          <span className="flex flex-wrap gap-2">
            <Button size="small" onClick={() => askOnly(withNumeral.map((label) => label.start))}>Ask all</Button>
            <Button size="small" onClick={() => askOnly(withNumeral.filter(isChromatic).map((label) => label.start))}>Only chromatic chords</Button>
            <Button size="small" onClick={() => askOnly([])}>Ask none</Button>
          </span>
        )}
      </div>
      <div className="grid gap-8 xl:grid-cols-[minmax(0,1fr)_21rem]">
        <ScorePicker
          scoreUrl={`/api/readings/${keyReadingId}/score`}
          firstBar={assignment.firstBar}
          lastBar={assignment.lastBar}
          reading={reading}
          sheet={assignment.conventions ?? DEFAULT_CONVENTIONS}
          currentId={currentId}
          marks={marks}
          say={(label) => (questions.has(label.start) ? 'asked' : 'not asked')}
          onSelect={setCurrentId}
          onToggle={toggleId}
        />
        {current && currentKey ? (
          <QuestionDetail
            key={current.id}
            assignment={assignment}
            label={current}
            alternatives={currentKey.alternatives}
            points={questions.get(current.start) ?? null}
            asked={questions.has(current.start)}
            fixed={fixed}
            mayChange={mayChange}
            onToggle={() => toggleId(current.id)}
            onPoints={(points) => setPoints(current.start, points)}
          />
        ) : null}
      </div>
      <QuestionList assignment={assignment} keyLabels={keyLabels} questions={questions} fixed={fixed} currentId={currentId} onSelect={setCurrentId} onToggle={toggleId} />
    </div>
  );
}

function marksOf(reading: Reading, questions: Questions): ReadonlyMap<string, LabelMark> {
  const markOf = (label: Label): LabelMark =>
    questions.has(label.start) ? { shape: 'disc', tone: 'settled' } : { shape: 'dash', tone: 'plain' };
  return new Map(reading.labels.map((label) => [label.id, markOf(label)]));
}

function sumOf(questions: Questions, assignment: EditedAssignment): number {
  return [...questions.values()].reduce<number>((sum, points) => sum + (points ?? assignment.rubric.pointsPerLabel), 0);
}
