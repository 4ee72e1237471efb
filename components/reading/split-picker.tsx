'use client';

import { type KeyboardEvent, useState } from 'react';
import { nameBeat, namePlace } from '@/components/score/beats';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';

interface SplitPickerProps {
  readonly score: Score;
  readonly label: Label;
  readonly onsets: readonly number[];
  onSplit(tick: number): void;
  onCancel(): void;
}

/** Chooses the note at which a label is split: arrows and Enter, or a press. */
export function SplitPicker({ score, label, onsets, onSplit, onCancel }: SplitPickerProps) {
  const inside = onsets.filter((t) => t > label.start && t < label.end);
  const [at, setAt] = useState(() => Math.max(0, nearestMiddle(inside, label)));
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    const tick = inside[at];
    if (event.key === 'ArrowRight') setAt((n) => Math.min(inside.length - 1, n + 1));
    else if (event.key === 'ArrowLeft') setAt((n) => Math.max(0, n - 1));
    else if (event.key === 'Enter' && tick !== undefined) onSplit(tick);
    else if (event.key === 'Escape') onCancel();
    else return;
    event.preventDefault();
  };
  return (
    <div className="max-w-[20rem] border border-ink bg-sheet p-2 text-base text-ink" onKeyDown={onKeyDown}>
      {inside.length === 0 ? (
        <p>No other note begins within this label.</p>
      ) : (
        <>
          <p className="mb-1 text-small" id="split-at">Split at</p>
          <div role="listbox" aria-labelledby="split-at" tabIndex={0} autoFocus ref={(box) => box?.focus()} aria-activedescendant={`split-${inside[at]}`} className="flex max-h-40 flex-wrap gap-1 overflow-y-auto">
            {inside.map((tick, i) => (
              <div
                key={tick}
                id={`split-${tick}`}
                role="option"
                aria-selected={i === at}
                aria-label={namePlace(score, tick)}
                onClick={() => onSplit(tick)}
                className={i === at ? 'min-h-7 bg-ink px-2 py-0.5 text-paper' : 'min-h-7 border border-rule-strong px-2 py-0.5 hover:bg-bench'}
              >
                {beatOf(score, tick)}
              </div>
            ))}
          </div>
        </>
      )}
      {/* With nothing to choose, the keys still belong to the picker: Escape must close it. */}
      <button type="button" ref={(button) => void (inside.length === 0 && button?.focus())} className="link mt-1 min-h-6 text-small" onClick={onCancel}>Leave</button>
    </div>
  );
}

function beatOf(score: Score, tick: number): string {
  const bar = score.bars.findLast((b) => b.start <= tick);
  return `${bar?.number ?? ''}, ${nameBeat(score, tick)}`;
}

function nearestMiddle(ticks: readonly number[], label: Label): number {
  const middle = (label.start + label.end) / 2;
  return ticks.reduce((best, tick, i) => (Math.abs(tick - middle) < Math.abs((ticks[best] ?? Infinity) - middle) ? i : best), 0);
}
