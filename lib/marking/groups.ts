import { signFramed } from './frame';
import type { SpanMark } from './compare-with-key';
import { VERDICTS } from './verdict';

/** The marks of one submission. */
export interface MarkedAnswer {
  readonly submissionId: string;
  readonly marks: readonly SpanMark[];
}

/** Students who wrote the same over a span and were judged the same. */
export interface AnswerGroup {
  /** Equal for equal answers; opaque. */
  readonly signature: string;
  /** The mark of the first of them: all are alike. */
  readonly mark: SpanMark;
  readonly submissionIds: readonly string[];
}

export interface QuestionGroups {
  readonly keyLabelId: string;
  readonly start: number;
  readonly end: number;
  /** Best verdict first, then the most frequent. */
  readonly groups: readonly AnswerGroup[];
}

/**
 * What is the same answer: the same chords at the same places. The verdict and points are part of it, since a label's
 * neighbours can decide (a six-four by what follows), and marking one must be right for all.
 */
export function signAnswer(mark: SpanMark): string {
  const pieces = mark.answer.map((piece) => `${piece.start - mark.start}=${piece.chord ? signFramed(piece.chord) : ''}`);
  return [...pieces, mark.verdict, mark.points].join(' ');
}

/** Groups the answers to each asked span, in order of time. */
export function groupAnswers(answers: readonly MarkedAnswer[]): QuestionGroups[] {
  const questions = new Map<number, Map<string, { mark: SpanMark; submissionIds: string[] }>>();
  for (const { submissionId, marks } of answers) {
    for (const mark of marks) {
      const groups = questions.get(mark.start) ?? new Map<string, { mark: SpanMark; submissionIds: string[] }>();
      questions.set(mark.start, groups);
      const group = groups.get(signAnswer(mark)) ?? { mark, submissionIds: [] };
      group.submissionIds.push(submissionId);
      groups.set(signAnswer(mark), group);
    }
  }
  return [...questions.values()].map((groups) => questionOf([...groups].map(([signature, group]) => ({ signature, ...group })))).sort(byTime);
}

function questionOf(groups: AnswerGroup[]): QuestionGroups {
  const first = (groups[0] as AnswerGroup).mark;
  return { keyLabelId: first.keyLabelId, start: first.start, end: first.end, groups: groups.sort(byVerdict) };
}

function byTime(a: QuestionGroups, b: QuestionGroups): number {
  return a.start - b.start;
}

function byVerdict(a: AnswerGroup, b: AnswerGroup): number {
  const rank = (group: AnswerGroup) => VERDICTS.indexOf(group.mark.verdict);
  return rank(a) - rank(b) || b.submissionIds.length - a.submissionIds.length || a.signature.localeCompare(b.signature);
}
