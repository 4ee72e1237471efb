'use client';

import { useMemo } from 'react';
import { Desk, type Feedback } from '@/components/reading/desk';
import { LabelFeedback } from '@/components/marking/label-feedback';
import type { PlacedBar } from '@/components/marking/place-names';
import { VERDICT_LOOKS } from '@/components/marking/verdict-mark';
import { Section } from '@/components/ui';
import type { Reading } from '@/lib/harmony/reading';
import { formatPoints } from '@/lib/marking/points';
import { VERDICT_NAMES } from '@/lib/marking/verdict';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { FeedbackList } from './feedback-list';
import type { StudentMark } from './feedback-of';

interface FeedbackDeskProps {
  readonly userId: string;
  readonly readingId: string;
  readonly version: number;
  readonly reading: Reading;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly bars: readonly PlacedBar[];
  readonly conventions: ConventionSheet | null;
  readonly keysGiven: boolean;
  readonly feedback: readonly StudentMark[];
}

/** The handed-in analysis with its verdicts: on the score, and below it as a list. */
export function FeedbackDesk(props: FeedbackDeskProps) {
  const { readingId, reading, feedback, bars } = props;
  const sheet = props.conventions ?? DEFAULT_CONVENTIONS;
  const base = `/api/readings/${readingId}`;
  const byLabel = useMemo(() => feedbackByLabel(reading, feedback, sheet, props.keysGiven), [reading, feedback, sheet, props.keysGiven]);
  return (
    <>
      <div className="mb-8 h-[min(78dvh,46rem)] border border-rule-strong">
        <Desk
          base={base}
          scoreUrl={`${base}/score`}
          mode="feedback"
          userId={props.userId}
          reading={reading}
          version={props.version}
          firstBar={props.firstBar}
          lastBar={props.lastBar}
          sheet={sheet}
          feedback={byLabel}
          heading={<span className="text-small text-ink-soft">Choose a label to read what was said about it</span>}
        />
      </div>
      <Section title="Label by label">
        <FeedbackList feedback={feedback} bars={bars} sheet={sheet} keysGiven={props.keysGiven} />
      </Section>
    </>
  );
}

/** A span's mark hangs on the label that stands where it begins, or that covers its beginning. */
function feedbackByLabel(reading: Reading, feedback: readonly StudentMark[], sheet: ConventionSheet, keysGiven: boolean): Record<string, Feedback> {
  const entries = feedback.flatMap((mark): [string, Feedback][] => {
    const label = reading.labels.find((one) => one.start <= mark.start && mark.start < one.end);
    return label ? [[label.id, faceOf(mark, sheet, keysGiven)]] : [];
  });
  return Object.fromEntries(entries);
}

function faceOf(mark: StudentMark, sheet: ConventionSheet, keysGiven: boolean): Feedback {
  const points = `${formatPoints(mark.points)} of ${formatPoints(mark.maxPoints)} points`;
  return {
    ...VERDICT_LOOKS[mark.verdict],
    note: `${formatPoints(mark.points)}/${formatPoints(mark.maxPoints)}`,
    verdict: VERDICT_NAMES[mark.verdict],
    points,
    body: <LabelFeedback reasons={mark.reasons} remark={mark.remark} keyed={mark.keyed} sheet={sheet} keyShown={!keysGiven} />,
  };
}
