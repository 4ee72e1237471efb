import type { ErrorKind, Verdict } from './verdict';
import { ERROR_KINDS, VERDICTS } from './verdict';
import { tidy } from './points';

/** What counts of a mark for the tally, after any override. */
export interface TallyMark {
  readonly start: number;
  readonly verdict: Verdict;
  readonly points: number;
  readonly maxPoints: number;
  readonly errors: readonly ErrorKind[];
}

export interface TallyAnswer {
  readonly studentId: string;
  readonly marks: readonly TallyMark[];
}

/** One kind of error over a class: how often, and by how many students. */
export interface KindTally {
  readonly kind: ErrorKind;
  readonly times: number;
  readonly students: number;
  /** The spans where it happened, by start, most frequent first. */
  readonly starts: readonly number[];
}

/** Kinds of error, the most widespread first: what to reteach. Spans that were given full marks do not count. */
export function tallyErrors(answers: readonly TallyAnswer[]): KindTally[] {
  const seen = answers.flatMap(({ studentId, marks }) =>
    marks
      .filter((mark) => mark.points < mark.maxPoints)
      .flatMap((mark) => mark.errors.map((kind) => ({ kind, studentId, start: mark.start }))),
  );
  return ERROR_KINDS.map((kind) => tallyKind(kind, seen.filter((one) => one.kind === kind)))
    .filter((tally) => tally.times > 0)
    .sort((a, b) => b.students - a.students || b.times - a.times);
}

function tallyKind(kind: ErrorKind, seen: readonly { studentId: string; start: number }[]): KindTally {
  const counts = new Map<number, number>();
  for (const { start } of seen) counts.set(start, (counts.get(start) ?? 0) + 1);
  const starts = [...counts].sort(([a, m], [b, n]) => n - m || a - b).map(([start]) => start);
  return { kind, times: seen.length, students: new Set(seen.map((one) => one.studentId)).size, starts };
}

export interface QuestionTally {
  readonly start: number;
  readonly answers: number;
  /** Mean share of full marks, 0–1. */
  readonly mean: number;
  readonly verdicts: Readonly<Record<Verdict, number>>;
}

/** How each asked span went, in order of time. */
export function tallyQuestions(answers: readonly TallyAnswer[]): QuestionTally[] {
  const marks = answers.flatMap((answer) => answer.marks);
  const starts = [...new Set(marks.map((mark) => mark.start))].sort((a, b) => a - b);
  return starts.map((start) => tallyQuestion(start, marks.filter((mark) => mark.start === start)));
}

function tallyQuestion(start: number, marks: readonly TallyMark[]): QuestionTally {
  const share = marks.reduce((sum, mark) => sum + (mark.maxPoints > 0 ? mark.points / mark.maxPoints : 0), 0);
  const verdicts = Object.fromEntries(VERDICTS.map((v) => [v, marks.filter((mark) => mark.verdict === v).length]));
  return { start, answers: marks.length, mean: tidy(share / marks.length), verdicts: verdicts as Record<Verdict, number> };
}
