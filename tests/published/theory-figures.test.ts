import { describe, expect, it } from 'vitest';

import { stepsUp } from '@/lib/theory/interval';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { type Fifths } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';

import { key, names, notes, numeral, tones } from '../support/numerals';

// Source: Open Music Theory v1 (CC BY-SA 4.0), "Thoroughbass figures" and "Roman numerals from figured bass":
// each figure, what it stands for in full, and how far above the bass the root lies.
const FIGURES: readonly [string, string, number][] = [
  ['I', '5 3', 0],
  ['I6', '6 3', 5],
  ['I64', '6 4', 3],
  ['V7', '7 5 3', 0],
  ['V65', '6 5 3', 5],
  ['V43', '6 4 3', 3],
  ['V42', '6 4 2', 1],
];

/** The letters above the bass as figures, from the top down. */
function figuresOver(bass: Fifths, spelled: readonly Fifths[]): string {
  const above = spelled.map((tone) => stepsUp(bass, tone) + 1).filter((figure) => figure > 1);
  return above.toSorted((a, b) => b - a).join(' ');
}

describe('figures', () => {
  it.each(FIGURES)('%s in C major stands for %s over its bass, the root %i steps above', (text, full, rootAbove) => {
    const chord = spellNumeral(key('C'), numeral('C', text));
    expect(figuresOver(chord.bass, chord.tones.map((tone) => tone.fifths))).toBe(full);
    expect(stepsUp(chord.bass, chord.root)).toBe(rootAbove);
  });

  // Source: the same. What may be left out: 6 = 6/3, 6/5 = 6/5/3, 4/3 = 6/4/3, 4/2 or 2 = 6/4/2, 7 = 7/5/3.
  it.each([
    ['I', 'I5/3'],
    ['I6', 'I6/3'],
    ['V7', 'V7/5/3'],
    ['V65', 'V6/5/3'],
    ['V43', 'V6/4/3'],
    ['V42', 'V6/4/2'],
    ['V42', 'V2'],
    ['V65', 'V6/5'],
    ['V65', 'V6-5'],
  ])('%s is the same numeral as %s', (short, long) => {
    expect(parseNumeral(long, 'major')).toEqual(parseNumeral(short, 'major'));
  });

  // Source: Open Music Theory v1, "Functional dissonances" (vii°7 in c minor, its inversions by bass tone).
  it.each([
    ['vii°7', 'B D F Ab'],
    ['vii°65', 'D F Ab B'],
    ['vii°43', 'F Ab B D'],
    ['vii°42', 'Ab B D F'],
  ])('%s in c minor is %s from the bass up, both ways', (text, spelled) => {
    expect(notes('c', text)).toBe(spelled);
    expect(names('c', spelled)[0]).toBe(text);
    expect(tones(spelled)).toHaveLength(4);
  });
});
