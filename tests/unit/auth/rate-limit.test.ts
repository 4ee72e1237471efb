import { describe, expect, it } from 'vitest';
import { LIMITS, LONGEST_WINDOW, isOverLimit } from '@/lib/auth/rate-limit';

describe('isOverLimit', () => {
  const limit = { minutes: 15, perEmail: 3, perAddress: 5 };

  it('lets the last allowed try through and stops the next', () => {
    expect(isOverLimit(limit, { byEmail: 3, byAddress: 3 })).toBe(false);
    expect(isOverLimit(limit, { byEmail: 4, byAddress: 4 })).toBe(true);
    expect(isOverLimit(limit, { byEmail: 1, byAddress: 6 })).toBe(true);
  });

  it('lets a classroom behind one address sign in', () => {
    expect(LIMITS.password.perAddress).toBeGreaterThanOrEqual(40);
  });
});

describe('LONGEST_WINDOW', () => {
  it('covers every limit, so that no counted try is deleted too soon', () => {
    for (const { minutes } of Object.values(LIMITS)) expect(LONGEST_WINDOW).toBeGreaterThanOrEqual(minutes);
  });
});
