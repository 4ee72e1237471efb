import { describe, expect, it } from 'vitest';
import { compareReadings, takeOver } from '@/lib/harmony/differences';
import { findTileFaults } from '@/lib/harmony/edit';
import { unwrap } from '@/lib/result';
import { numeralsOf } from '../../support/reading-edits';
import { readingFrom } from '../../support/reading-notation';

function differ(mine: string, theirs: string): string {
  return compareReadings(readingFrom(mine), readingFrom(theirs))
    .map(({ start, end, kinds }) => `${start}–${end} ${kinds.join(' ')}`)
    .join(', ');
}

// The kinds are those of issue 5, item 6; which pair is which follows from the notes the numerals spell.
describe('compareReadings', () => {
  it.each([
    ['nothing', 'C: I V7 I', 'C: I V7 I', ''],
    ['other root', 'C: I ii6 V', 'C: I IV V', '4–8 root'],
    ['other kind of chord', 'C: I V V7', 'C: I V7 V7', '4–8 quality'],
    ['other inversion', 'C: I V65 I', 'C: I V7 I', '4–8 inversion'],
    ['other kind and inversion', 'C: I V I', 'C: I V65 I', '4–8 quality inversion'],
    ['tonicised against modulated', 'C: I V7/V V', 'C: I G: V7 C: V', '4–8 frame'],
    ['the same chord in another key', 'C: I vi', 'C: I G: ii', '4–8 frame'],
    ['other name', 'C: Cad64 V', 'C: I64 V', '0–4 name'],
    ['a blank', 'C: I _ V', 'C: I ii V', '4–8 blank'],
    ['another moment', 'C: I*2 V*2', 'C: I*1 V*3', '4–8 boundary'],
    ['a later moment', 'C: I*1 V*3', 'C: I*2 V*2', '4–8 boundary'],
    ['a chord written anew', 'C: I*2 V', 'C: I I V', '4–8 boundary'],
  ])('names %s', (_, mine, theirs, expected) => {
    expect(differ(mine, theirs)).toBe(expected);
  });
});

describe('takeOver', () => {
  let made = 0;
  const newId = () => `new-${(made += 1)}`;

  it.each([
    ['a chord', 'C: I ii6 V', 'C: I IV V'],
    ['a boundary', 'C: I*2 V*2', 'C: I*1 V*3'],
    ['a frame', 'C: I V7/V V', 'C: I G: V7 C: V'],
    ['a finer segmentation', 'C: I*2 V', 'C: I I6 V'],
    ['a key over several labels', 'C: I vi ii V I', 'C: I G: ii V I IV'],
  ])('%s leaves the readings alike when all is taken', (_, mine, theirs) => {
    let own = readingFrom(mine);
    const other = readingFrom(theirs);
    for (let turn = 0; turn < 10; turn += 1) {
      const [difference] = compareReadings(own, other);
      if (!difference) break;
      own = unwrap(takeOver(own, difference, newId)).reading;
      expect(findTileFaults(own)).toEqual([]);
    }
    expect(numeralsOf(own)).toBe(numeralsOf(other));
  });

  it('keeps the id of the label it covers most', () => {
    const own = readingFrom('C: I*3 V');
    const [difference] = compareReadings(own, readingFrom('C: I*1 V*3'));
    const { reading } = unwrap(takeOver(own, difference!, newId));
    expect(reading.labels.map((l) => [l.start, l.end])).toEqual([[0, 4], [4, 16]]);
    expect(reading.labels.filter((l) => l.id === 'label-0')).toHaveLength(1);
  });
});
