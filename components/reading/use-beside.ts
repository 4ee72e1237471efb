'use client';

import { type Dispatch, useMemo, useState } from 'react';
import { type Difference, compareReadings, takeOver } from '@/lib/harmony/differences';
import type { Reading } from '@/lib/harmony/reading';
import { type DeskAction, type DeskState, getSelected } from './desk-state';

/** Another reading of the same excerpt, laid beside the desk's own. */
export interface BesideReading {
  readonly title: string;
  /** Whose it is, in a word or a name. */
  readonly by: string;
  readonly reading: Reading;
}

export interface Beside extends BesideReading {
  readonly differences: readonly Difference[];
  /** The one looked at: at the selected label. */
  readonly current: Difference | null;
  goTo(difference: Difference): void;
  /** To the next difference or the one before, going round. */
  step(by: -1 | 1): void;
  /** Writes the other reading's label over one's own. */
  take(difference: Difference | null): void;
}

export function useBeside(beside: BesideReading | undefined, state: DeskState, dispatch: Dispatch<DeskAction>): Beside | null {
  const [at, setAt] = useState<number | null>(null);
  const differences = useMemo(() => (beside ? compareReadings(state.reading, beside.reading) : []), [beside, state.reading]);
  if (!beside) return null;
  const label = getSelected(state);
  const here = differences.filter((d) => d.mine.id === label.id);
  const current = here.find((d) => d.start === at) ?? here[0] ?? null;
  const goTo = (difference: Difference) => {
    setAt(difference.start);
    dispatch({ kind: 'select', labelId: difference.mine.id });
  };
  return {
    ...beside,
    differences,
    current,
    goTo,
    step: (by) => {
      const from = current?.start ?? label.start;
      const next = by > 0 ? (differences.find((d) => d.start > from) ?? differences[0]) : (differences.findLast((d) => d.start < from) ?? differences.at(-1));
      if (next) goTo(next);
      else dispatch({ kind: 'say', text: 'The two readings are alike.' });
    },
    take: (difference) => {
      if (!difference) return dispatch({ kind: 'say', text: 'The readings do not differ at this label.' });
      const result = takeOver(state.reading, difference, () => crypto.randomUUID());
      dispatch({ kind: 'edit', editId: crypto.randomUUID(), result, words: `Took over a label of ${beside.by}.` });
    },
  };
}
