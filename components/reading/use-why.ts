'use client';

import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import type { explainLabel } from '@/lib/harmony/explain';
import type { Reading, Why } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';

type Explain = typeof explainLabel;

/** The engine's own code and its weights are fetched when the score is drawn and the page has come to rest. */
const REST_MS = 120;

/**
 * The evidence for a label, worked out here by the engine's own code; null for a blank, as long as there is no score to look
 * at, and until that code is there.
 */
export function useWhy(score: Score | null, reading: Reading, labelId: string): Why | null {
  const [explain, setExplain] = useState<{ readonly run: Explain } | null>(null);
  const isWanted = score !== null;
  useEffect(() => {
    if (!isWanted) return;
    let live = true;
    const timer = setTimeout(() => {
      void import('@/lib/harmony/explain').then(({ explainLabel: run }) => live && setExplain({ run }));
    }, REST_MS);
    return () => {
      live = false;
      clearTimeout(timer);
    };
  }, [isWanted]);
  // The edit itself is seen first.
  const [later, laterId] = [useDeferredValue(reading), useDeferredValue(labelId)];
  return useMemo(() => {
    const index = later.labels.findIndex((label) => label.id === laterId);
    return explain && score && later.labels[index]?.numeral ? explain.run(score, later, index) : null;
  }, [explain, score, later, laterId]);
}
