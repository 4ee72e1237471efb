import { describe, expect, it } from 'vitest';
import { type Setting, compareWithKey } from '@/lib/marking/compare-with-key';
import { groupAnswers } from '@/lib/marking/groups';
import { DEFAULT_RUBRIC } from '@/lib/marking/rubric';
import { tallyErrors, tallyQuestions } from '@/lib/marking/tally';
import { READING_TICKS, keyReadingFrom, readingFrom } from '../../support/reading-notation';

const GIVEN: Setting = { segmentation: 'given', keysGiven: true, ticksPerQuarter: READING_TICKS };
const KEY = keyReadingFrom('C: Cad64 V7 I');

function answers(...notations: readonly string[]) {
  return notations.map((notation, i) => ({
    submissionId: `s${i}`,
    studentId: `s${i}`,
    marks: compareWithKey(KEY, readingFrom(notation), DEFAULT_RUBRIC, GIVEN),
  }));
}

describe('groupAnswers', () => {
  const questions = groupAnswers(answers('C: I64 V7 I', 'C: Cad64 V I', 'C: I64 V I', 'C: V64 vi I', 'C: _ V7 I'));

  it('puts identical answers of a question together, best verdict and then most frequent first', () => {
    expect(questions.map((q) => q.start)).toEqual([0, 4, 8]);
    expect(questions[1]?.groups.map((g) => [g.mark.verdict, g.submissionIds])).toEqual([
      ['as-keyed', ['s0', 's4']],
      ['partly', ['s1', 's2']],
      ['not-this', ['s3']],
    ]);
    expect(questions[2]?.groups).toHaveLength(1);
  });

  it('keeps apart the same label that its neighbours make right for one and wrong for another', () => {
    const [first] = groupAnswers(answers('C: V64 V7 I', 'C: V64 vi I'));
    expect(first?.groups.map((g) => g.mark.verdict)).toEqual(['as-keyed', 'not-this']);
  });
});

describe('tallyErrors and tallyQuestions', () => {
  const given = answers('C: I64 V7 I', 'C: Cad64 V I', 'C: I64 V I6', 'C: _ V I');

  it('counts each kind by students and times, the most widespread first', () => {
    expect(tallyErrors(given).map((t) => [t.kind, t.students, t.times, t.starts])).toEqual([
      ['seventh-missing', 3, 3, [4]],
      ['blank', 1, 1, [0]],
      ['inversion', 1, 1, [8]],
    ]);
  });

  it('leaves out what a teacher gave full marks', () => {
    const pardoned = given.map((a) => ({ ...a, marks: a.marks.map((m) => ({ ...m, points: m.maxPoints })) }));
    expect(tallyErrors(pardoned)).toEqual([]);
  });

  it('says how each span went', () => {
    const [first, second] = tallyQuestions(given);
    expect(first).toMatchObject({ start: 0, answers: 4, mean: 0.75 });
    expect(second?.verdicts).toMatchObject({ 'as-keyed': 1, partly: 3 });
  });
});
