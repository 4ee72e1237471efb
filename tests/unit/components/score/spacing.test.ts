import { describe, expect, it } from 'vitest';
import { onsetsPerQuarter, widenFor } from '@/components/score/spacing';
import { scoreFrom } from '../../../support/notation';

describe('spacing', () => {
  it('is wider where a chord comes with every note than where notes run on', () => {
    expect(widenFor(1).multiplier).toBeGreaterThan(widenFor(4).multiplier);
    expect(widenFor(1).addend).toBeGreaterThan(widenFor(4).addend);
  });

  it('changes without a step between the two', () => {
    for (let onsets = 0; onsets < 6; onsets += 0.1) {
      expect(Math.abs(widenFor(onsets).multiplier - widenFor(onsets + 0.1).multiplier)).toBeLessThan(0.05);
    }
  });

  it('counts each moment once, however many notes begin there', () => {
    expect(onsetsPerQuarter(scoreFrom('C: c3 e3 g3 c4 | d3 f3 a3 d4'), 0, 0)).toBe(1);
  });
});
