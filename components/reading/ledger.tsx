'use client';

import { useEffect, useMemo, useRef } from 'react';
import { Button, ShapeIcon, TONE_TEXT, classNames } from '@/components/ui';
import { isSettled } from '@/components/score/label-look';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { Bar, Score } from '@/lib/score/score';

interface LedgerProps {
  readonly score: Score;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly reading: Reading;
  readonly selected: Label;
  isGiven(label: Label): boolean;
  onSelect(labelId: string): void;
  onNextOpen?: (() => void) | undefined;
}

interface BarState {
  readonly bar: Bar;
  /** The label it begins with or is within; the target of a press. */
  readonly label: Label | null;
  readonly open: number;
  readonly labels: number;
}

/** One cell per bar with its state: everything settled, some of it, nothing. */
export function Ledger({ score, firstBar, lastBar, reading, selected, isGiven, onSelect, onNextOpen }: LedgerProps) {
  const bars = useMemo(() => score.bars.slice(firstBar, lastBar + 1).map((bar) => stateOf(bar, reading, isGiven)), [score, firstBar, lastBar, reading, isGiven]);
  const counted = reading.labels.filter((l) => !isGiven(l));
  const settled = counted.filter(isSettled).length;
  const strip = useRef<HTMLOListElement>(null);
  const here = bars.findLast(({ bar }) => bar.start <= selected.start)?.bar.index ?? firstBar;

  useEffect(() => {
    const cell = strip.current?.querySelector<HTMLElement>(`[data-bar="${here}"]`);
    if (cell && strip.current) strip.current.scrollTo({ left: cell.offsetLeft - strip.current.clientWidth / 2, behavior: 'smooth' });
  }, [here]);

  return (
    <div className="flex items-center gap-3 border-t border-rule-strong bg-sheet px-3 py-1.5">
      <p className="tabular shrink-0 text-small"><strong className="font-medium">{settled}</strong> of {counted.length} settled</p>
      <ol ref={strip} aria-label="Bars" className="relative flex min-w-0 flex-1 overflow-x-auto py-0.5">
        {bars.map((state) => (
          <li key={state.bar.index}>
            <Cell state={state} here={state.bar.index === here} onSelect={onSelect} />
          </li>
        ))}
      </ol>
      {onNextOpen ? <Button size="small" kind="quiet" onClick={onNextOpen} disabled={settled === counted.length}>Next open</Button> : null}
    </div>
  );
}

function stateOf(bar: Bar, reading: Reading, isGiven: (label: Label) => boolean): BarState {
  const end = bar.start + bar.length;
  const begun = reading.labels.filter((l) => l.start >= bar.start && l.start < end);
  const label = begun.find((l) => !isGiven(l)) ?? begun[0] ?? reading.labels.findLast((l) => l.start < bar.start) ?? null;
  const counted = begun.filter((l) => !isGiven(l));
  return { bar, label, labels: counted.length, open: counted.filter((l) => !isSettled(l)).length };
}

function lookOf({ open, labels }: BarState) {
  if (labels === 0) return { shape: 'dash', tone: 'plain', words: 'nothing begins here' } as const;
  if (open === 0) return { shape: 'disc', tone: 'settled', words: 'settled' } as const;
  return open < labels ? ({ shape: 'half', tone: 'open', words: `${open} of ${labels} open` } as const) : ({ shape: 'ring', tone: 'open', words: 'open' } as const);
}

function Cell({ state, here, onSelect }: { readonly state: BarState; readonly here: boolean; onSelect(labelId: string): void }) {
  const look = lookOf(state);
  const number = state.bar.number === '' ? '·' : state.bar.number;
  return (
    <button
      type="button"
      data-bar={state.bar.index}
      aria-label={`Bar ${number}: ${look.words}`}
      aria-current={here ? 'location' : undefined}
      onClick={() => state.label && onSelect(state.label.id)}
      className={classNames('flex h-9 w-7 flex-col items-center justify-center gap-1 border-y border-r border-rule text-micro leading-none hover:bg-bench', state.bar.index === 0 && 'border-l', here && 'bg-selection')}
    >
      <span className="tabular text-ink-soft">{number}</span>
      <ShapeIcon shape={look.shape} className={classNames('size-2.5!', TONE_TEXT[look.tone])} />
    </button>
  );
}
