import { type Assignment, type Question, unsafeGetKeyRow, unsafeListQuestions } from '@/db/queries/assignments';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import type { Reading } from '@/lib/harmony/reading';
import type { KeyReading } from '@/lib/marking/key-reading';
import type { Setting } from '@/lib/marking/compare-with-key';
import type { Deps } from './deps';
import { readingOf } from './stored-reading';

/** The key with what is asked of it, for marking. Whoever calls it has found the assignment as someone who may see its key. */
export async function unsafeGetKey(deps: Deps, assignmentId: string): Promise<{ readonly key: KeyReading; readonly reading: Reading; readonly readingId: string }> {
  const row = await unsafeGetKeyRow(deps.db, assignmentId);
  const reading = readingOf(await unsafeLoadReadingContent(deps.db, row));
  const questions = await unsafeListQuestions(deps.db, assignmentId);
  return { key: keyOf(reading, questions), reading, readingId: row.id };
}

/** Questions name spans by their start: a label of the key that starts elsewhere now is no longer asked. */
function keyOf(reading: Reading, questions: readonly Question[]): KeyReading {
  const byStart = new Map(questions.map((question) => [question.startTick, question]));
  return {
    start: reading.start,
    end: reading.end,
    regions: reading.regions,
    labels: reading.labels.map(({ id, start, end, key, numeral }) => {
      const question = byStart.get(start);
      const asked = question !== undefined;
      return { id, start, end, key, numeral, asked, points: question?.points ?? null, alternatives: question?.alternatives ?? [] };
    }),
  };
}

export function settingOf(assignment: Assignment): Setting {
  const { segmentation, keysGiven, ticksPerQuarter } = assignment;
  return { segmentation, keysGiven, ticksPerQuarter };
}
