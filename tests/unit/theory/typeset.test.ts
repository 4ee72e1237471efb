import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { CONVENTION_PRESETS, type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { type NumeralParts, typesetAfter, typesetNumeral } from '@/lib/theory/typeset';

import { anyMode, anyNumeral, anySheet, key, numeral } from '../../support/numerals';

function parts(name: string, text: string, sheet: ConventionSheet = DEFAULT_CONVENTIONS): NumeralParts {
  return typesetNumeral(numeral(name, text), key(name).mode, sheet);
}

function printed(name: string, text: string, sheet: Partial<ConventionSheet>): string {
  return formatNumeral(numeral(name, text), key(name).mode, { ...DEFAULT_CONVENTIONS, ...sheet });
}

describe('typesetNumeral', () => {
  it('takes viiø65/V apart', () => {
    expect(parts('C', 'viiø65/V')).toMatchObject({
      accidental: '',
      letters: 'vii',
      isName: false,
      mark: 'ø',
      figures: ['6', '5'],
      figureStyle: 'stacked',
      joint: '/',
      applied: [{ letters: 'V', figures: [], applied: [] }],
      text: 'viiø65/V',
    });
  });

  it.each([
    ['C', '♭VI6', { accidental: '♭', letters: 'VI', figures: ['6'] }],
    ['C', 'Ger65', { letters: 'Ger', isName: true, figures: ['6', '5'] }],
    ['C', 'N6', { letters: 'N', isName: true, figures: ['6'] }],
    ['C', 'Cad64', { letters: 'Cad', isName: true, figures: ['6', '4'], runsOn: false }],
    ['C', 'V(sus4)', { letters: 'V', figures: [], notes: ['sus4'] }],
    ['C', 'imaj7', { letters: 'i', seventh: 'maj', figures: ['7'] }],
    ['C', 'V♭9', { letters: 'V', figures: ['♭9'] }],
    ['C', 'Ped V', { letters: 'Ped V', isName: true }],
    ['c', 'III+6', { letters: 'III', mark: '+', figures: ['6'] }],
  ])('in %s, %s is %j', (name, text, expected) => {
    expect(parts(name, text)).toMatchObject(expected);
  });

  it('gives text that is formatNumeral’s under every sheet', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, anySheet, (chord, mode, sheet) => {
        expect(typesetNumeral(chord, mode, sheet).text).toBe(formatNumeral(chord, mode, sheet));
      }),
      { numRuns: 500 },
    );
  });

  // Common practice, no source: how the label is said in class.
  it.each([
    ['C', 'V7', 'five seven'],
    ['C', 'ii65', 'minor two six five'],
    ['C', 'viiø7/V', 'seven half-diminished seven of five'],
    ['C', 'vii°7/ii', 'seven diminished seven of minor two'],
    ['C', '♭VI', 'flat six'],
    ['C', 'N6', 'Neapolitan six'],
    ['C', 'Ger65', 'German sixth six five'],
    ['C', 'Cad64', 'cadential six four'],
    ['C', 'CT°7', 'common-tone diminished seven'],
    ['C', 'Ped V', 'pedal on five'],
    ['C', 'I(add6)', 'one added sixth'],
    ['c', '♯VI', 'sharp six'],
  ])('in %s, %s is spoken %j', (name, text, expected) => {
    expect(parts(name, text).spoken).toBe(expected);
  });
});

describe('a convention sheet', () => {
  it.each([
    ['C', 'Cad64', { cadential: 'dominant' }, 'V64'],
    ['C', 'Cad64', { cadential: 'tonic' }, 'I64'],
    ['c', 'Cad64', { cadential: 'tonic' }, 'i64'],
    ['C', 'V64', { cadential: 'dominant' }, 'V64(plain)'],
    ['C', 'I64', { cadential: 'tonic' }, 'I64(plain)'],
    ['C', 'V7/V', { applied: 'of' }, 'V7 of V'],
    ['C', 'V7/V/ii', { applied: 'of' }, 'V7 of V of ii'],
    ['C', 'N6', { neapolitan: 'flat-two' }, '♭II6'],
    ['C', 'V7/N', { neapolitan: 'flat-two' }, 'V7/♭II'],
    ['C', 'V65', { figures: 'slashed' }, 'V6/5'],
    ['C', 'ii', { case: 'all-capitals' }, 'II'],
    ['C', 'iv', { case: 'all-capitals' }, 'IVm'],
    ['C', 'vii°', { case: 'all-capitals' }, 'VII°'],
    ['c', 'i', { case: 'all-capitals' }, 'I'],
    ['c', 'VI', { accidentals: 'from-major' }, '♭VI'],
    ['c', 'vii°', { accidentals: 'from-major' }, 'vii°'],
    ['C', '♭VI', { accidentals: 'borrowed-plain' }, 'VI'],
    ['C', 'viiø7', { halfDiminished: 'plain' }, 'vii7'],
    ['C', 'Ger65', { augmentedSixths: 'plus-six' }, 'Ger+6'],
    ['C', 'Ger7', { augmentedSixths: 'plus-six' }, 'Ger7'],
  ] as const)('in %s prints %s under %j as %s', (name, text, sheet, expected) => {
    expect(printed(name, text, sheet)).toBe(expected);
  });

  it('slashed figures are a style of setting too', () => {
    expect(parts('C', 'V65', { ...DEFAULT_CONVENTIONS, figures: 'slashed' }).figureStyle).toBe('slashed');
  });

  it('presets are told apart by their content', () => {
    const contents = Object.values(CONVENTION_PRESETS).map((sheet) => JSON.stringify(sheet));
    expect(new Set(contents).size).toBe(contents.length);
  });
});

describe('typesetAfter', () => {
  const sheet = { ...DEFAULT_CONVENTIONS, cadential: 'dominant' } as const;
  const after = (previous: string | null, text: string, by: ConventionSheet = sheet) =>
    typesetAfter(previous === null ? null : numeral('C', previous), numeral('C', text), 'major', by);

  it('V after the six-four shows its figures alone, and says what it is', () => {
    expect(after('Cad64', 'V')).toMatchObject({ letters: '', figures: ['5', '3'], text: 'V', spoken: 'five' });
  });

  it('the same applied: V/V after Cad64/V', () => {
    expect(after('Cad64/V', 'V/V')).toMatchObject({ letters: '', figures: ['5', '3'], applied: [] });
  });

  it.each([
    [null, 'V'],
    ['I64', 'V'],
    ['Cad64', 'V65'],
    ['Cad64', 'V7/V'],
    ['Cad64', 'vi'],
  ])('after %s, %s is set whole', (previous, text) => {
    expect(after(previous, text)).toEqual(parts('C', text, sheet));
  });

  it('other sheets set every label whole', () => {
    expect(after('Cad64', 'V', DEFAULT_CONVENTIONS)).toEqual(parts('C', 'V'));
  });
});
