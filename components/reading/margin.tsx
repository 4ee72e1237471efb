'use client';

import type { ReactNode } from 'react';
import { Button, Mark, Tabs } from '@/components/ui';
import { lookOf } from '@/components/score/label-look';
import { KeyName, NumeralText } from '@/components/score/numeral-text';
import type { Label } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { typesetNumeral } from '@/lib/theory/typeset';
import type { Feedback } from './desk-types';
import { speakCertainty } from './label-words';

export interface MarginPage {
  readonly value: string;
  readonly label: ReactNode;
  readonly content: ReactNode;
}

interface MarginProps {
  readonly label: Label;
  readonly place: string;
  readonly sheet: ConventionSheet;
  readonly given: boolean;
  readonly feedback: Feedback | undefined;
  readonly pages: readonly MarginPage[];
  readonly page: string;
  onPage(page: string): void;
  readonly onAccept?: (() => void) | undefined;
  readonly onClose?: (() => void) | undefined;
}

/** What is known about the selected label. */
export function Margin({ label, place, sheet, given, feedback, pages, page, onPage, onAccept, onClose }: MarginProps) {
  const look = lookOf(label);
  return (
    <div className="flex flex-col gap-3 p-4">
      <header className="flex items-start gap-3">
        <div className="min-w-0 flex-1">
          <p className="text-small text-ink-soft">{place.replace(/^./, (c) => c.toUpperCase())} · <KeyName keyValue={label.key} /></p>
          <h2 className="flex min-h-12 flex-wrap items-baseline gap-x-3 text-display">
            {label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} /> : <span className="text-lead text-ink-soft italic">a blank</span>}
          </h2>
          <p className="flex flex-wrap items-baseline gap-x-3 text-small">
            {given ? <span className="text-ink-soft">given</span> : feedback ? <Mark tone={feedback.tone} shape={feedback.shape}>{feedback.verdict}</Mark> : <Mark tone={look.tone} shape={look.shape}>{look.word}</Mark>}
            {feedback?.points ? <span>{feedback.points}</span> : null}
            {label.certainty !== null && label.numeral ? <span className="text-ink-soft">{speakCertainty(label.certainty)}</span> : null}
          </p>
        </div>
        {onAccept ? <Button size="small" kind="primary" onClick={onAccept}>Accept</Button> : null}
        {onClose ? <Button size="small" kind="quiet" className="lg:hidden" onClick={onClose}>Close</Button> : null}
      </header>
      {feedback?.body ? <div className="border-l-2 border-rule-strong pl-3">{feedback.body}</div> : null}
      <Tabs label="Margin" tabs={pages} value={page} onValueChange={onPage} />
    </div>
  );
}
