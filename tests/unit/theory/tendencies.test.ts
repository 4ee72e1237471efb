import { describe, expect, it } from 'vitest';

import { formatPitchClass } from '@/lib/theory/pitch';
import { tendenciesOf } from '@/lib/theory/tendencies';

import { key, numeral, pulls, targets } from '../../support/numerals';

/** `B leading-tone>C(G)`: tone, kind, where it goes, where it may go. */
function described(name: string, text: string): string[] {
  return tendenciesOf(key(name), numeral(name, text)).tones.map(({ fifths, kind, expected, allowed }) => {
    const also = allowed.length > 0 ? `(${allowed.map(formatPitchClass).join(' ')})` : '';
    return `${formatPitchClass(fifths)} ${kind}>${expected.map(formatPitchClass).join('|')}${also}`;
  });
}

// Source: Open Music Theory v1 (CC BY-SA 4.0), "Functional dissonances" and "Applied chords": leading tones rise,
// sevenths fall. What stands in brackets is common practice, no source.
describe('tendenciesOf', () => {
  it.each([
    ['C', 'V7', ['B leading-tone>C(G)', 'F seventh>E']],
    ['c', 'V7', ['B leading-tone>C(G)', 'F seventh>Eb']],
    ['C', 'V43', ['F seventh>E(G)', 'B leading-tone>C(G)']],
    ['C', 'V9', ['B leading-tone>C(G)', 'F seventh>E', 'A ninth>G']],
    ['C', 'V7/V', ['F# leading-tone>G(D F)', 'C seventh>B']],
    ['C', 'V7/IV', ['E leading-tone>F(C Eb)', 'Bb seventh>A']],
    ['C', 'vii°6', ['F fifth>E(G)', 'B leading-tone>C']],
    ['c', 'iiø65', ['C seventh>B']],
    ['C', 'ii7', ['C seventh>B']],
    ['c', 'iv7', ['Eb seventh>D']],
    ['C', 'IV7', ['E seventh>D']],
    ['C', 'V+', ['B leading-tone>C(G)', 'D# altered>E']],
    ['C', 'V(sus4)', ['C suspended>B']],
    ['c', 'V7(sus4)', ['C suspended>B', 'F seventh>Eb']],
    ['C', 'iv', ['Ab altered>G']],
    ['C', '♭VI', ['Ab altered>G']],
    ['c', 'III+', ['B leading-tone>C(G)']],
    ['C', 'I', []],
    ['c', 'I', []],
    ['c', 'IV', []],
    ['C', '♭VII', []],
    ['C', 'Ped', []],
    ['C', 'V?', []],
  ])('in %s, %s: %j', (name, text, expected) => {
    expect(described(name, text)).toEqual(expected);
  });

  it('marks the leading tone of a tonicised chord as temporary', () => {
    const temporary = (text: string) => tendenciesOf(key('C'), numeral('C', text)).tones.map((tone) => tone.temporary);
    expect([temporary('V7'), temporary('V7/V')]).toEqual([[false, false], [true, false]]);
  });

  it('says why in a sentence', () => {
    const [first] = tendenciesOf(key('D'), numeral('D', 'vii°7/V')).tones;
    expect(first?.reason).toBe('The temporary leading tone, G♯, rises by half step to A.');
  });

  // Common practice, no source.
  it.each([
    ['C', 'V7', 'I vi'],
    ['c', 'V7', 'i VI'],
    ['C', 'V65', 'I'],
    ['C', 'V43', 'I I6'],
    ['C', 'V42', 'I6'],
    ['C', 'V42/IV', 'IV6'],
    ['C', 'V7/V', 'V V7 Cad64 vi/V'],
    ['C', 'V7/ii', 'ii VI/ii'],
    ['c', 'vii°7/iv', 'iv V/iv V7/iv'],
    ['C', 'V7/V/ii', 'V/ii V7/ii Cad64/ii vi/V/ii'],
    ['C', 'ii65', 'V V7 Cad64'],
    ['C', 'iii', ''],
  ])('in %s, %s leads to %j', (name, text, expected) => {
    expect(targets(name, text)).toBe(expected);
  });

  it('goes by the tonicised key: G♯-B-D-F before A minor in C', () => {
    expect(pulls('C', 'vii°7/vi')).toBe('G#>A D>C F>E');
  });
});
