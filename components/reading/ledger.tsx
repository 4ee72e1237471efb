'use client';

import { memo, useEffect, useMemo, useRef } from 'react';
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
  const bars = useMemo(() => statesOf(score.bars.slice(firstBar, lastBar + 1), reading, isGiven), [score, firstBar, lastBar, reading, isGiven]);
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
            <Cell index={state.bar.index} number={state.bar.number} labelId={state.label?.id ?? null} open={state.open} labels={state.labels} here={state.bar.index === here} onSelect={onSelect} />
          </li>
        ))}
      </ol>
      {onNextOpen ? <Button size="small" kind="quiet" onClick={onNextOpen} disabled={settled === counted.length}>Next open</Button> : null}
    </div>
  );
}

/** Bars and labels both in order of time: one way through them. */
function statesOf(bars: readonly Bar[], { labels }: Reading, isGiven: (label: Label) => boolean): BarState[] {
  let at = 0;
  return bars.map((bar) => {
    const from = at;
    while (at < labels.length && (labels[at] as Label).start < bar.start + bar.length) at += 1;
    const begun = labels.slice(from, at);
    const counted = begun.filter((l) => !isGiven(l));
    const label = counted[0] ?? begun[0] ?? labels[from - 1] ?? null;
    return { bar, label, labels: counted.length, open: counted.filter((l) => !isSettled(l)).length };
  });
}

function lookOf({ open, labels }: Pick<BarState, 'open' | 'labels'>) {
  if (labels === 0) return { shape: 'dash', tone: 'plain', words: 'nothing begins here' } as const;
  if (open === 0) return { shape: 'disc', tone: 'settled', words: 'settled' } as const;
  return open < labels ? ({ shape: 'half', tone: 'open', words: `${open} of ${labels} open` } as const) : ({ shape: 'ring', tone: 'open', words: 'open' } as const);
}

interface CellProps extends Pick<BarState, 'open' | 'labels'> {
  readonly index: number;
  /** As printed. */
  readonly number: string;
  readonly labelId: string | null;
  readonly here: boolean;
  onSelect(labelId: string): void;
}

/** Drawn anew only when something of its own bar changes: a long score has hundreds. */
const Cell = memo(function Cell({ index, number: printed, labelId, open, labels, here, onSelect }: CellProps) {
  const look = lookOf({ open, labels });
  const number = printed === '' ? '·' : printed;
  return (
    <button
      type="button"
      data-bar={index}
      aria-label={`Bar ${number}: ${look.words}`}
      aria-current={here ? 'location' : undefined}
      onClick={() => labelId && onSelect(labelId)}
      className={classNames('flex h-9 w-7 flex-col items-center justify-center gap-1 border-y border-r border-rule text-micro leading-none hover:bg-bench', index === 0 && 'border-l', here && 'bg-selection')}
    >
      <span className="tabular text-ink-soft">{number}</span>
      <ShapeIcon shape={look.shape} className={classNames('size-2.5!', TONE_TEXT[look.tone])} />
    </button>
  );
});
