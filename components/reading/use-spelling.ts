'use client';

import { useState } from 'react';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { DeskProps } from './desk-types';

/** A convention sheet that the desk can print labels under, named by its course or by what it prints. */
export interface Spelling {
  readonly id: string;
  readonly name: string;
  readonly sheet: ConventionSheet;
}

export interface SpellingChoice {
  readonly sheet: ConventionSheet;
  /** Empty where there is nothing to choose: the sheet is given then. */
  readonly spellings: readonly Spelling[];
  readonly chosenId: string;
  choose(id: string): void;
}

const STORED = 'understave.spelling';

/**
 * The sheet labels are printed under and typed text is read under. A person's choice holds for every desk of theirs in
 * this browser, except where a course decides: its key opens under the course's own sheet (`courseId`).
 */
export function useSpelling({ userId, spellings = [], courseId = null, sheet }: Pick<DeskProps, 'userId' | 'spellings' | 'courseId' | 'sheet'>): SpellingChoice {
  const [chosenId, setChosenId] = useState<string | null>(() => courseId ?? localStorage.getItem(`${STORED}.${userId}`));
  const chosen = spellings.find(({ id }) => id === chosenId) ?? spellings[0];
  return {
    sheet: chosen?.sheet ?? sheet ?? DEFAULT_CONVENTIONS,
    spellings,
    chosenId: chosen?.id ?? '',
    choose: (id) => {
      setChosenId(id);
      localStorage.setItem(`${STORED}.${userId}`, id);
    },
  };
}
