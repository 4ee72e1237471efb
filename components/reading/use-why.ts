'use client';

import { useMemo } from 'react';
import type { Reading, Why } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';

export function useWhy(score: Score | null, reading: Reading, labelId: string): Why | null {
  return useMemo(() => (score && reading && labelId ? null : null), [score, reading, labelId]);
}
