import { describe, expect, it } from 'vitest';
import { formatBars, progressOfExcerpt, progressOfReading } from '@/components/library/excerpt-progress';

const ENGINE = { kind: 'engine', state: 'open', labelCount: 14, settledCount: 0 } as const;
const MINE = { kind: 'person', state: 'open', labelCount: 14, settledCount: 12 } as const;

describe('progressOfReading', () => {
  it('counts settled labels of a person’s reading and proposed ones of the engine’s', () => {
    expect(progressOfReading(MINE)).toEqual({ mark: 'open', words: '12 of 14 settled' });
    expect(progressOfReading({ ...MINE, settledCount: 14 })).toEqual({ mark: 'settled', words: '14 of 14 settled' });
    expect(progressOfReading(ENGINE)).toEqual({ mark: 'suggested', words: '14 labels proposed' });
  });

  it('says when a proposal is on its way or failed', () => {
    expect(progressOfReading({ ...ENGINE, state: 'proposing', labelCount: 0 }).mark).toBe('working');
    expect(progressOfReading({ ...ENGINE, state: 'failed', labelCount: 0 }).mark).toBe('failed');
  });
});

describe('progressOfExcerpt', () => {
  it('shows the reading by a person that is furthest, or else the proposal', () => {
    expect(progressOfExcerpt([ENGINE, { ...MINE, settledCount: 2 }, MINE]).words).toBe('12 of 14 settled');
    expect(progressOfExcerpt([ENGINE]).words).toBe('14 labels proposed');
    expect(progressOfExcerpt([]).words).toBe('no reading yet');
  });
});

describe('formatBars', () => {
  it('writes a range, one bar, or the place where no number is printed', () => {
    expect(formatBars({ index: 4, number: '5' }, { index: 11, number: '12' })).toBe('5–12');
    expect(formatBars({ index: 4, number: '5' }, { index: 4, number: '5' })).toBe('5');
    expect(formatBars({ index: 0, number: '' }, { index: 2, number: '2' })).toBe('(1)–2');
  });
});
