import { describe, expect, it } from 'vitest';
import { checkKey } from '@/lib/marking/check-key';
import { DEFAULT_RUBRIC, RUBRIC_PRESETS, checkRubric } from '@/lib/marking/rubric';
import { keyReadingFrom } from '../../support/reading-notation';

const KEY = keyReadingFrom('C: I V7 I');
const asking = (asked: readonly boolean[], points: number | null = null) => ({ ...KEY, labels: KEY.labels.map((label, i) => ({ ...label, asked: asked[i] ?? false, points })) });

describe('checkKey', () => {
  it('finds nothing in a key that is whole and accepted', () => {
    expect(checkKey(KEY, [])).toEqual([]);
  });

  it('stops a key that asks nothing, asks a blank, or gives no points', () => {
    expect(checkKey(asking([]), [])).toMatchObject([{ severity: 'stop', starts: [] }]);
    const blank = { ...KEY, labels: KEY.labels.map((label, i) => (i === 1 ? { ...label, numeral: null } : label)) };
    expect(checkKey({ ...blank, labels: blank.labels.map((label) => ({ ...label, asked: true })) }, [])).toMatchObject([{ severity: 'stop', starts: [4] }]);
    expect(checkKey(asking([true], 0), [])).toMatchObject([{ severity: 'stop', starts: [0] }]);
  });

  it('points at what the program proposed and nobody accepted, where it is asked', () => {
    expect(checkKey(asking([true, false, true]), [4, 8])).toMatchObject([{ severity: 'look', starts: [8] }]);
  });
});

describe('checkRubric', () => {
  it('takes every preset', () => {
    for (const preset of Object.values(RUBRIC_PRESETS)) expect(checkRubric(preset.rubric)).toEqual([]);
  });

  it('says what cannot be', () => {
    expect(checkRubric({ ...DEFAULT_RUBRIC, pointsPerLabel: 0 })).toHaveLength(1);
    expect(checkRubric({ ...DEFAULT_RUBRIC, frameCredit: 1.5, pointStep: Number.NaN })).toHaveLength(2);
    expect(checkRubric({ ...DEFAULT_RUBRIC, shares: { ...DEFAULT_RUBRIC.shares, root: 0, key: -1 } })).toHaveLength(2);
  });
});
