'use client';

import { useState } from 'react';
import { ChordName } from '@/components/marking/chord-name';
import { placeOf, shortPlaceOf } from '@/components/marking/place-names';
import { Button, Mark, classNames } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { GroupList } from './group-list';
import type { MarkedAssignment, QuestionView } from './marking-views';

interface ByQuestionProps {
  readonly assignment: MarkedAssignment;
  readonly questions: readonly QuestionView[];
  readonly remarks: readonly string[];
  readonly mayChangeKey: boolean;
}

/** One question at a time, its answers in groups of the same. */
export function ByQuestion({ assignment, questions, remarks, mayChangeKey }: ByQuestionProps) {
  const [at, setAt] = useState(() => Math.max(0, questions.findIndex((question) => question.settled < question.total)));
  const question = questions[Math.min(at, questions.length - 1)];
  if (!question) return null;
  const go = (step: number) => setAt(Math.min(questions.length - 1, Math.max(0, at + step)));
  return (
    <div className="grid gap-x-8 gap-y-4 md:grid-cols-[11rem_minmax(0,1fr)]">
      <QuestionNavigation assignment={assignment} questions={questions} at={at} onGo={setAt} />
      <section aria-label={`Question at ${placeOf(assignment.bars, question.start)}`} className="min-w-0">
        <QuestionHead assignment={assignment} question={question} />
        <GroupList key={question.start} assignment={assignment} question={question} remarks={remarks} mayChangeKey={mayChangeKey} onOnward={() => go(1)} onQuestion={go} />
        <div className="mt-4 flex justify-between gap-4">
          <Button onClick={() => go(-1)} disabled={at === 0}>Question before</Button>
          <Button onClick={() => go(1)} disabled={at >= questions.length - 1}>Next question</Button>
        </div>
      </section>
    </div>
  );
}

function QuestionNavigation({ assignment, questions, at, onGo }: { readonly assignment: MarkedAssignment; readonly questions: readonly QuestionView[]; readonly at: number; onGo(at: number): void }) {
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  return (
    <nav aria-label="Questions" className="-mx-1 flex gap-1 overflow-x-auto px-1 pb-2 md:max-h-[70vh] md:flex-col md:gap-0 md:overflow-x-hidden md:overflow-y-auto">
      {questions.map((question, place) => (
        <button
          key={question.start}
          type="button"
          aria-current={place === at ? 'true' : undefined}
          onClick={() => onGo(place)}
          className={classNames('flex min-h-11 shrink-0 items-center justify-between gap-3 border-b border-rule px-2 py-1 text-left hover:bg-bench md:w-full', place === at && 'bg-selection')}
        >
          <span className="min-w-0">
            <span className="tabular block text-micro text-ink-soft">{shortPlaceOf(assignment.bars, question.start)}</span>
            {question.keyed[0] ? <ChordName chord={question.keyed[0]} sheet={sheet} /> : '–'}
          </span>
          <Mark tone={question.settled === question.total ? 'settled' : 'open'} shape={question.settled === question.total ? 'check' : 'ring'} className="text-micro">
            {question.settled}/{question.total}
          </Mark>
        </button>
      ))}
    </nav>
  );
}

function QuestionHead({ assignment, question }: { readonly assignment: MarkedAssignment; readonly question: QuestionView }) {
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  const [own, ...beside] = question.keyed;
  return (
    <div className="mb-3 flex flex-wrap items-baseline gap-x-6 gap-y-1 border-b border-rule-strong pb-2">
      <h2 className="text-title first-letter:uppercase">{placeOf(assignment.bars, question.start)}</h2>
      {own ? (
        <p className="flex items-baseline gap-2"><span className="caps text-small text-ink-soft">Key</span><ChordName chord={own} sheet={sheet} keyShown /></p>
      ) : (
        <p className="text-madder">The key has no label here any more.</p>
      )}
      {beside.length > 0 ? <p className="flex items-baseline gap-2"><span className="text-small text-ink-soft">also right</span>{beside.map((chord, i) => <ChordName key={i} chord={chord} sheet={sheet} />)}</p> : null}
      <p className="ml-auto text-small text-ink-soft"><span className="tabular">{formatPoints(question.maxPoints)}</span> points, on average <span className="tabular">{Math.round(question.mean * 100)} %</span></p>
    </div>
  );
}
