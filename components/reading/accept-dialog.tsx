'use client';

import { useId, useState } from 'react';
import { Button, Dialog, DialogActions } from '@/components/ui';
import { findSuggestions } from '@/lib/harmony/edit';
import type { Reading } from '@/lib/harmony/reading';

interface AcceptDialogProps {
  readonly reading: Reading;
  onAccept(atLeast: number): void;
  onClose(): void;
}

const START = 90;

/** Accepts every suggestion from a chosen certainty on, and says beforehand how many those are. */
export function AcceptDialog({ reading, onAccept, onClose }: AcceptDialogProps) {
  const [percent, setPercent] = useState(START);
  const id = useId();
  const open = findSuggestions(reading, reading.start, reading.end).length;
  const count = findSuggestions(reading, reading.start, reading.end, percent / 100).length;
  return (
    <Dialog open onOpenChange={(isOpen) => !isOpen && onClose()} title="Accept from a certainty on" description="Suggestions at least this certain are accepted; the others stay open. It can be undone.">
      <form
        className="flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          onAccept(percent / 100);
          onClose();
        }}
      >
        <label htmlFor={id}>At least this certain</label>
        <div className="flex items-center gap-3">
          <input id={id} type="range" autoFocus min={30} max={99} value={percent} onChange={(event) => setPercent(Number(event.target.value))} className="h-6 flex-1 accent-ink" aria-valuetext={`${percent} per cent`} />
          <span className="tabular w-14">{percent} %</span>
        </div>
        <p aria-live="polite">{count === 0 ? 'No suggestion is as certain as that.' : `${count} of ${open} open suggestions.`}</p>
        <DialogActions>
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" kind="primary" disabled={count === 0}>Accept {count === 1 ? 'it' : 'them'}</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
