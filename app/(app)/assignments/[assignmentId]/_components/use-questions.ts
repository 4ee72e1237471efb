'use client';

import { useRef, useState } from 'react';
import { useAnnouncer } from '@/components/ui';
import type { KeyLabel } from '@/lib/marking/key-reading';
import { ask } from '../../actions';

/** Start of a label → its own points, or null for the rubric's. Only asked labels are in it. */
export type Questions = ReadonlyMap<number, number | null>;

interface UseQuestions {
  readonly questions: Questions;
  readonly saving: boolean;
  toggle(start: number): void;
  askOnly(starts: readonly number[]): void;
  setPoints(start: number, points: number | null): void;
}

/** What is asked, shown at once and saved as it changes; a refused change is taken back and said. */
export function useQuestions(assignmentId: string, keyLabels: readonly KeyLabel[]): UseQuestions {
  const [questions, setQuestions] = useState<Questions>(() => questionsOf(keyLabels));
  const [saving, setSaving] = useState(0);
  const confirmed = useRef(questions);
  const queue = useRef(Promise.resolve());
  const { warn } = useAnnouncer();

  const save = async (next: Questions) => {
    const list = [...next].map(([startTick, points]) => ({ startTick, points }));
    const outcome = await ask({ assignmentId, questions: list }).catch(() => null);
    setSaving((count) => count - 1);
    if (outcome?.ok) {
      confirmed.current = next;
      return;
    }
    setQuestions(confirmed.current);
    warn(outcome?.error.message ?? 'The server did not answer. The change was not saved; try again.');
  };
  const change = (next: Questions) => {
    setQuestions(next);
    setSaving((count) => count + 1);
    queue.current = queue.current.then(() => save(next));
  };
  return {
    questions,
    saving: saving > 0,
    toggle(start) {
      const next = new Map(questions);
      if (!next.delete(start)) next.set(start, null);
      change(next);
    },
    askOnly: (starts) => change(new Map(starts.map((start) => [start, questions.get(start) ?? null]))),
    setPoints(start, points) {
      if (questions.has(start)) change(new Map(questions).set(start, points));
    },
  };
}

function questionsOf(keyLabels: readonly KeyLabel[]): Questions {
  return new Map(keyLabels.filter((label) => label.asked).map((label) => [label.start, label.points]));
}
