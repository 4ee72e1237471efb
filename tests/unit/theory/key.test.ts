import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { KEYS, degreeOfFifths, fifthsOfDegree, formatKey, formatKeyForPeople, isWrittenKey, parseKey, signatureOf } from '@/lib/theory/key';
import { fifths } from '@/lib/theory/pitch';

import { anyKey, key } from '../../support/numerals';

describe('parseKey', () => {
  it.each([
    ['Eb major', 'Eb major'],
    ['E♭ major', 'Eb major'],
    ['eb major', 'Eb major'],
    ['c# minor', 'C# minor'],
    ['C# minor', 'C# minor'],
    ['f♯ minor', 'F# minor'],
    ['Eb', 'Eb major'],
    ['c#', 'C# minor'],
    ['b', 'B minor'],
    ['bb', 'Bb minor'],
    ['Bb', 'Bb major'],
    ['B-flat major', 'Bb major'],
    ['F sharp minor', 'F# minor'],
    [' g min ', 'G minor'],
    ['A Maj', 'A major'],
  ])('%j is %s', (text, expected) => {
    expect(formatKey(key(text))).toBe(expected);
  });

  it.each([
    ['', 0, 'A key begins with its tonic'],
    ['H major', 0, 'A key begins with its tonic'],
    ['Eb majr', 2, 'Expected “major” or “minor” after the tonic Eb.'],
    ['Eb major x', 2, 'Expected “major” or “minor”'],
    ['Ebbb', 3, 'Expected “major” or “minor”'],
    ['C#b', 2, 'Expected “major” or “minor”'],
  ])('%j stops at %i', (text, offset, message) => {
    const read = parseKey(text);
    expect(read.ok).toBe(false);
    if (!read.ok) expect([read.error.offset, read.error.message]).toEqual([offset, expect.stringContaining(message)]);
  });

  it('gives back every key from either of its texts', () => {
    for (const one of KEYS) expect([parseKey(formatKey(one)), parseKey(formatKeyForPeople(one))]).toEqual([{ ok: true, value: one }, { ok: true, value: one }]);
  });
});

describe('keys', () => {
  it('KEYS are thirty, with signatures from seven flats to seven sharps in both modes', () => {
    expect(KEYS).toHaveLength(30);
    expect(new Set(KEYS.map((one) => `${signatureOf(one)} ${one.mode}`)).size).toBe(30);
    expect(KEYS.every(isWrittenKey)).toBe(true);
    expect(isWrittenKey(key('G# major'))).toBe(false);
  });

  it('degreeOfFifths and fifthsOfDegree undo each other', () => {
    fc.assert(
      fc.property(anyKey, fc.integer({ min: -20, max: 20 }), (here, place) => {
        expect(fifthsOfDegree(here, degreeOfFifths(here, fifths(place)))).toBe(place);
      }),
    );
  });
});
