import { describe, expect, it } from 'vitest';
import { findBar, formatBar, pickBar } from '@/components/library/bar-range';

/** An upbeat without a number, bars 1–3, a second ending 3a, and a second movement that counts from 1 again. */
const BARS = ['', '1', '2', '3', '3a', '1', '2'].map((number, index) => ({ index, number }));

describe('findBar', () => {
  it('finds a bar by its printed number, in either case', () => {
    expect(findBar(BARS, '2')).toBe(2);
    expect(findBar(BARS, ' 3A ')).toBe(4);
  });

  it('means the first at or after `from` where a number is printed twice', () => {
    expect(findBar(BARS, '1')).toBe(1);
    expect(findBar(BARS, '1', 2)).toBe(5);
    expect(findBar(BARS, '3', 5)).toBe(3);
  });

  it('finds a bar without a number by its place', () => {
    expect(findBar(BARS, '(1)')).toBe(0);
    expect(findBar(BARS, '(8)')).toBeNull();
  });

  it('finds nothing for a number that is not printed, or for nothing', () => {
    expect(findBar(BARS, '4')).toBeNull();
    expect(findBar(BARS, '2 and more')).toBeNull();
    expect(findBar(BARS, '')).toBeNull();
  });

  it('reads back what formatBar writes', () => {
    for (const { index } of BARS) expect(findBar(BARS, formatBar(BARS, index), index)).toBe(index);
  });
});

describe('pickBar', () => {
  it('begins a range with the first press and ends it with the second, whichever way round', () => {
    expect(pickBar(null, 5)).toEqual({ range: { first: 5, last: 5 }, picking: 5 });
    expect(pickBar(5, 2)).toEqual({ range: { first: 2, last: 5 }, picking: null });
    expect(pickBar(2, 5)).toEqual({ range: { first: 2, last: 5 }, picking: null });
  });
});
