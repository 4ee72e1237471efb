'use client';

import { useMemo } from 'react';
import { explainLabel } from '@/lib/harmony/explain';
import type { Reading, Why } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';

/** The evidence for a label, worked out here by the engine's own code; null for a blank, or without a score to look at. */
export function useWhy(score: Score | null, reading: Reading, labelId: string): Why | null {
  return useMemo(() => {
    const index = reading.labels.findIndex((label) => label.id === labelId);
    return score && reading.labels[index]?.numeral ? explainLabel(score, reading, index) : null;
  }, [score, reading, labelId]);
}
