import { describe, expect, it } from 'vitest';
import { proposeReading } from '@/lib/harmony/propose';
import { type Reading } from '@/lib/harmony/reading';
import { validateReading } from '@/lib/harmony/validate';
import { ticks } from '@/lib/score/score';
import { scoreFrom } from '../../support/notation';

const sound = proposeReading(scoreFrom('C: c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5'));

function spoil(change: (reading: { -readonly [K in keyof Reading]: Reading[K] }) => void): readonly string[] {
  const copy = { ...sound };
  change(copy);
  return validateReading(copy);
}

describe('validateReading', () => {
  it('finds nothing in a sound reading', () => {
    expect(validateReading(sound)).toEqual([]);
  });

  it('finds a gap between labels', () => {
    expect(spoil((reading) => (reading.labels = reading.labels.filter((_, i) => i !== 1)))).not.toEqual([]);
  });

  it('finds an overlap', () => {
    expect(spoil((reading) => (reading.labels = reading.labels.map((label, i) => (i === 1 ? { ...label, end: ticks(label.end + 1) } : label))))).not.toEqual([]);
  });

  it('finds labels that share an id', () => {
    expect(spoil((reading) => (reading.labels = reading.labels.map((label) => ({ ...label, id: 'one' }))))).toContain('Two labels share an id.');
  });

  it('finds a label whose key is not its region’s', () => {
    const other = { tonic: 1 as Reading['labels'][number]['key']['tonic'], mode: 'minor' as const };
    expect(spoil((reading) => (reading.labels = reading.labels.map((label, i) => (i === 1 ? { ...label, key: other } : label))))).not.toEqual([]);
  });

  it('finds a reading that ends before its excerpt', () => {
    expect(spoil((reading) => (reading.end = ticks(reading.end + 1)))).not.toEqual([]);
  });

  it('finds a certainty beyond one', () => {
    expect(spoil((reading) => (reading.labels = reading.labels.map((label) => ({ ...label, certainty: 1.5 }))))).not.toEqual([]);
  });
});
