import { describe, expect, it } from 'vitest';
import { formatPoints, pointsOf, sumPoints } from '@/lib/marking/points';

describe('pointsOf', () => {
  it('goes to the nearest step', () => {
    expect(pointsOf(0.5, 2, 0.5)).toBe(1);
    expect(pointsOf(0.7, 2, 0.5)).toBe(1.5);
    expect(pointsOf(0.1, 2, 0.5)).toBe(0);
    expect(pointsOf(1 / 3, 3, 1 / 3)).toBe(1);
  });

  it('gives full marks for the whole only', () => {
    expect(pointsOf(0.99, 2, 0.5)).toBe(1.5);
    expect(pointsOf(0.9, 1, 1)).toBe(0);
    expect(pointsOf(1, 2.25, 0.5)).toBe(2.25);
  });

  it('sums without the dust of floating point', () => {
    expect(sumPoints([{ points: 0.1, maxPoints: 0.3 }, { points: 0.2, maxPoints: 0.3 }])).toEqual({ points: 0.3, maxPoints: 0.6 });
    expect(formatPoints(2.5)).toBe('2.5');
    expect(formatPoints(3)).toBe('3');
  });
});
