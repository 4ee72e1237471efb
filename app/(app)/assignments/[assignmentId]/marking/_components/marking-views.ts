import type { Mark } from '@/db/queries/marks';
import type { Submission } from '@/db/queries/submissions';
import type { PlacedBar } from '@/components/marking/place-names';
import { groupAnswers } from '@/lib/marking/groups';
import type { Framed, KeyReading } from '@/lib/marking/key-reading';
import type { Piece } from '@/lib/marking/pieces';
import { type Sum, sumPoints } from '@/lib/marking/points';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { SubmissionState, Verdict } from '@/lib/vocabularies';

/** What every part of the marking screen needs of the assignment. */
export interface MarkedAssignment {
  readonly id: string;
  readonly bars: readonly PlacedBar[];
  readonly conventions: ConventionSheet | null;
  readonly keysGiven: boolean;
  readonly pointStep: number;
  readonly firstBar: number;
  readonly lastBar: number;
}

/** One student's answer to one question, as it is marked now. */
export interface AnswerView {
  readonly submissionId: string;
  readonly studentName: string;
  readonly start: number;
  readonly end: number;
  readonly verdict: Verdict;
  readonly points: number;
  readonly maxPoints: number;
  readonly overridden: boolean;
  readonly remark: string | null;
  readonly settled: boolean;
  readonly proposed: { readonly verdict: Verdict; readonly points: number; readonly reasons: readonly string[] };
  readonly answer: readonly Piece[];
}

export interface GroupView {
  readonly signature: string;
  readonly answers: readonly AnswerView[];
}

export interface QuestionView {
  readonly start: number;
  readonly maxPoints: number;
  /** The key's label first, then what is accepted beside it; empty when the key no longer has a label there. */
  readonly keyed: readonly Framed[];
  readonly groups: readonly GroupView[];
  readonly settled: number;
  readonly total: number;
  /** Mean share of full marks, 0–1. */
  readonly mean: number;
}

export interface StudentView extends Sum {
  readonly submissionId: string;
  readonly name: string;
  readonly readingId: string;
  readonly attempt: number;
  readonly state: SubmissionState;
  readonly late: boolean;
  readonly settled: number;
  readonly answers: readonly AnswerView[];
}

function answerOf(mark: Mark, studentName: string): AnswerView {
  const { submissionId, startTick, endTick, verdict, points, maxPoints, overridden, remark, settled, proposed } = mark;
  return {
    submissionId,
    studentName,
    start: startTick,
    end: endTick,
    verdict,
    points,
    maxPoints,
    overridden,
    remark,
    settled,
    proposed: { verdict: proposed.verdict, points: proposed.points, reasons: proposed.reasons.map((reason) => reason.text) },
    answer: proposed.answer,
  };
}

/** By question: identical answers together, as the comparison proposed them; overrides do not tear a group apart. */
export function questionsOf(key: KeyReading, submissions: readonly Submission[], marks: readonly Mark[]): QuestionView[] {
  const names = new Map(submissions.map((submission) => [submission.id, submission.studentName]));
  const answers = submissions.map(({ id }) => ({ submissionId: id, marks: marks.filter((mark) => mark.submissionId === id).map((mark) => mark.proposed) }));
  return groupAnswers(answers).map(({ start, groups }) => {
    const views = groups.map(({ signature, submissionIds }) => ({
      signature,
      answers: submissionIds.flatMap((id) => {
        const mark = marks.find((one) => one.submissionId === id && one.startTick === start);
        return mark ? [answerOf(mark, names.get(id) ?? '')] : [];
      }),
    }));
    return { start, keyed: keyedAt(key, start), groups: views, ...progressOf(views.flatMap((view) => view.answers)) };
  });
}

function keyedAt(key: KeyReading, start: number): Framed[] {
  const label = key.labels.find((one) => one.start === start);
  return label?.numeral ? [{ key: label.key, numeral: label.numeral }, ...label.alternatives] : [];
}

function progressOf(answers: readonly AnswerView[]) {
  const share = answers.reduce((sum, one) => sum + (one.maxPoints > 0 ? one.points / one.maxPoints : 0), 0);
  return {
    settled: answers.filter((one) => one.settled).length,
    total: answers.length,
    maxPoints: answers[0]?.maxPoints ?? 0,
    mean: answers.length > 0 ? share / answers.length : 0,
  };
}

/** By student, as they stand. */
export function studentsOf(submissions: readonly Submission[], marks: readonly Mark[], dueAt: Date | null): StudentView[] {
  return submissions.map(({ id, studentName, readingId, attempt, state, handedInAt }) => {
    const own = marks.filter((mark) => mark.submissionId === id).map((mark) => answerOf(mark, studentName));
    return {
      submissionId: id,
      name: studentName,
      readingId,
      attempt,
      state,
      late: dueAt !== null && handedInAt !== null && handedInAt > dueAt,
      settled: own.filter((one) => one.settled).length,
      answers: own,
      ...sumPoints(own),
    };
  });
}
