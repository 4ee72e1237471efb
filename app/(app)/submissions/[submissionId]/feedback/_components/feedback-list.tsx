'use client';

import { useState } from 'react';
import { ChordName } from '@/components/marking/chord-name';
import { LabelFeedback } from '@/components/marking/label-feedback';
import { type PlacedBar, placeOf } from '@/components/marking/place-names';
import { VerdictMark } from '@/components/marking/verdict-mark';
import { Checkbox } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { StudentMark } from './feedback-of';

interface FeedbackListProps {
  readonly feedback: readonly StudentMark[];
  readonly bars: readonly PlacedBar[];
  readonly sheet: ConventionSheet;
  readonly keysGiven: boolean;
}

/** The same as on the score, in order: to read through, on a phone, or without seeing the score. */
export function FeedbackList({ feedback, bars, sheet, keysGiven }: FeedbackListProps) {
  const [onlyOpen, setOnlyOpen] = useState(false);
  const toLookAt = feedback.filter((mark) => mark.points < mark.maxPoints || mark.remark !== null);
  const shown = onlyOpen ? toLookAt : feedback;
  return (
    <>
      {toLookAt.length > 0 && toLookAt.length < feedback.length ? (
        <Checkbox className="mb-2" label={`Only the ${toLookAt.length} to look at again`} checked={onlyOpen} onChange={(event) => setOnlyOpen(event.target.checked)} />
      ) : null}
      <ol className="divide-y divide-rule border-y border-rule-strong">
        {shown.map((mark) => (
          <li key={mark.start} className="grid gap-x-6 gap-y-1 py-3 md:grid-cols-[11rem_minmax(0,14rem)_minmax(0,1fr)]">
            <div>
              <p className="text-small text-ink-soft first-letter:uppercase">{placeOf(bars, mark.start)}</p>
              <Answer mark={mark} sheet={sheet} keysGiven={keysGiven} />
            </div>
            <p className="flex items-baseline justify-between gap-4 md:justify-start">
              <VerdictMark verdict={mark.verdict} />
              <span className="tabular text-small whitespace-nowrap">{formatPoints(mark.points)} of {formatPoints(mark.maxPoints)}</span>
            </p>
            <LabelFeedback reasons={mark.reasons} remark={mark.remark} keyed={mark.keyed} sheet={sheet} keyShown={!keysGiven} />
          </li>
        ))}
      </ol>
    </>
  );
}

function Answer({ mark, sheet, keysGiven }: Pick<FeedbackListProps, 'sheet' | 'keysGiven'> & { readonly mark: StudentMark }) {
  return (
    <p className="flex flex-wrap items-baseline gap-x-3">
      {mark.answer.map((piece, place) =>
        piece.chord ? <ChordName key={place} chord={piece.chord} sheet={sheet} keyShown={!keysGiven} /> : <span key={place} className="text-ink-soft italic">blank</span>,
      )}
    </p>
  );
}
