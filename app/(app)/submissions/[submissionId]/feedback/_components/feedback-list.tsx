import { ChordName } from '@/components/marking/chord-name';
import { LabelFeedback } from '@/components/marking/label-feedback';
import { type PlacedBar, placeOf } from '@/components/marking/place-names';
import { VerdictMark } from '@/components/marking/verdict-mark';
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
  return (
    <ol className="divide-y divide-rule border-y border-rule-strong">
      {feedback.map((mark) => (
        <li key={mark.start} className="grid gap-x-6 gap-y-1 py-3 md:grid-cols-[11rem_minmax(0,14rem)_minmax(0,1fr)]">
          <div>
            <p className="text-small text-ink-soft">{placeOf(bars, mark.start)}</p>
            <p className="flex flex-wrap items-baseline gap-x-3">
              {mark.answer.map((piece, place) => (piece.chord ? <ChordName key={place} chord={piece.chord} sheet={sheet} keyShown={!keysGiven} /> : <span key={place} className="text-ink-soft italic">blank</span>))}
            </p>
          </div>
          <p className="flex items-baseline justify-between gap-4 md:justify-start">
            <VerdictMark verdict={mark.verdict} />
            <span className="tabular text-small whitespace-nowrap">{formatPoints(mark.points)} of {formatPoints(mark.maxPoints)}</span>
          </p>
          <LabelFeedback reasons={mark.reasons} remark={mark.remark} keyed={mark.keyed} sheet={sheet} keyShown={!keysGiven} />
        </li>
      ))}
    </ol>
  );
}
