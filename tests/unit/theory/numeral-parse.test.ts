import { describe, expect, it } from 'vitest';

import { CONVENTION_PRESETS, type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { Mode } from '@/lib/theory/key';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { parseNumeral, parseNumeralReadings } from '@/lib/theory/numeral-parse';
import { unwrap } from '@/lib/result';

import { notes } from '../../support/numerals';

function canonical(text: string, mode: Mode = 'major', sheet: ConventionSheet = DEFAULT_CONVENTIONS): string {
  return formatNumeral(unwrap(parseNumeral(text, mode, sheet)), mode);
}

/** `3: a triad …`: offset and message. */
function stop(text: string, mode: Mode = 'major', sheet: ConventionSheet = DEFAULT_CONVENTIONS): string {
  const read = parseNumeral(text, mode, sheet);
  return read.ok ? 'read' : `${read.error.offset}: ${read.error.message}`;
}

// Common practice, no source: forms of the printed notation and how they are typed on a plain keyboard.
describe('parseNumeral reads', () => {
  it.each([
    ['V6/5', 'V65'],
    ['V6-5', 'V65'],
    ['V6–5', 'V65'],
    ['V 6 5', 'V65'],
    ['V⁶₅', 'V65'],
    ['vii°⁷/V', 'vii°7/V'],
    ['V2', 'V42'],
    ['V4/2', 'V42'],
    ['I5/3', 'I'],
    ['I5', 'I'],
    ['V5/4', 'V(sus4)'],
    ['V7/4', 'V7(sus4)'],
    ['viio7', 'vii°7'],
    ['viiº7', 'vii°7'],
    ['vii dim 7', 'vii°7'],
    ['vii07', 'viiø7'],
    ['vii0 6/5', 'viiø65'],
    ['viiØ43', 'viiø43'],
    ['vii half-dim 7', 'viiø7'],
    ['vii half-diminished 7', 'viiø7'],
    ['IIIaug', 'III+'],
    ['bVI', '♭VI'],
    ['b VI6', '♭VI6'],
    ['#iv°7', '♯iv°7'],
    ['bII6', 'N6'],
    ['♭II6', 'N6'],
    ['N', 'N'],
    ['It', 'It6'],
    ['it6', 'It6'],
    ['It+6', 'It6'],
    ['Fr', 'Fr43'],
    ['Fr4/3', 'Fr43'],
    ['Ger', 'Ger65'],
    ['Gr6', 'Ger65'],
    ['German 6/5', 'Ger65'],
    ['CTo7', 'CT°7'],
    ['CT°', 'CT°7'],
    ['ct dim7', 'CT°7'],
    ['cad64', 'Cad64'],
    ['Cad. 6/4', 'Cad64'],
    ['Cad', 'Cad64'],
    ['Ped', 'Ped'],
    ['Ped. V', 'Ped V'],
    ['Ped I', 'Ped'],
    ['IM7', 'I7'],
    ['IVmaj7', 'IV7'],
    ['V♯7', 'Vmaj7'],
    ['Ib7', 'Idom7'],
    ['iim7', 'ii7'],
    ['iM7', 'imaj7'],
    ['V7b9', 'V♭9'],
    ['Vb9', 'V♭9'],
    ['V[add6]', 'V(add6)'],
    ['V sus4 add6', 'V(sus4,add6)'],
    ['V64 (passing)', 'V64(pass)'],
    ['ii9', 'ii7(add9)'],
    ['V7 of V', 'V7/V'],
    ['V7 of V of ii', 'V7/V/ii'],
    ['V65/V/ii', 'V65/V/ii'],
    [' V7 / V ', 'V7/V'],
    ['viio7/bII', 'vii°7/N'],
    ['V7/N', 'V7/N'],
  ])('%j as %s in major', (text, expected) => {
    expect(canonical(text)).toBe(expected);
  });

  it('6/5 as figures and /V as a target', () => {
    expect([notes('C', 'V6/5'), notes('C', 'V6/V'), notes('C', 'V6/5/V'), notes('C', 'V7/V')]).toEqual(['B D F G', 'F# A D', 'F# A C D', 'D F# A C']);
  });

  // Source: Open Music Theory v1 (CC BY-SA 4.0), Roman numerals in minor: vii° stands on the raised seventh, VII on the subtonic.
  it.each([
    ['vii°7', 'B D F Ab'],
    ['#vii°7', 'B D F Ab'],
    ['VII', 'Bb D F'],
    ['bVII', 'Bb D F'],
    ['vi°', 'A C Eb'],
    ['VI', 'Ab C Eb'],
    ['bVI', 'Ab C Eb'],
    ['bIII', 'Eb G Bb'],
    ['III+', 'Eb G B'],
    ['VII7', 'Bb D F Ab'],
    ['VI7', 'Ab C Eb G'],
    ['IV7', 'F A C Eb'],
    ['v7', 'G Bb D F'],
    ['#VI', 'A C# E'],
    ['bvii', 'Bb Db F'],
    ['bbVI', 'Abb Cb Ebb'],
  ])('%s in c minor as %s', (text, spelled) => {
    expect(notes('c', text)).toBe(spelled);
  });

  it.each([
    ['I7', 'C E G B'],
    ['IV7', 'F A C E'],
    ['V7', 'G B D F'],
    ['VI7', 'A C# E G'],
    ['vii7', 'B D F# A'],
    ['♭VI7', 'Ab C Eb G'],
    ['♭VII7', 'Bb D F Ab'],
    ['iv7', 'F Ab C Eb'],
    ['V+7', 'G B D# F'],
    ['I+7', 'C E G# B'],
    ['V9', 'G B D F A'],
    ['V765', 'B D F G A'],
    ['V7642', 'A B D F G'],
  ])('%s in C major as %s', (text, spelled) => {
    expect(notes('C', text)).toBe(spelled);
  });
});

describe('parseNumeral stops', () => {
  it.each([
    ['', '0: Nothing is typed.'],
    ['  ', '0: Nothing is typed.'],
    ['x', '0: Stopped at “x” (character 1): expected a numeral from I to VII'],
    ['V7x', '2: Stopped at “x” (character 3): expected figures'],
    ['V7 V', '3: Stopped at “V” (character 4)'],
    ['Vi', '1: Stopped at “i” (character 2): “Vi” mixes capital and small letters'],
    ['vII', '1: Stopped at “I” (character 2): “vII” mixes'],
    ['IIII', '3: Stopped at “I” (character 4): “IIII” is no numeral'],
    ['VIV', '2: Stopped at “V” (character 3): “VIV” is no numeral'],
    ['VII°', '3: Stopped at “°” (character 4): VII in capitals has a major third'],
    ['VIIø7', '3: Stopped at “ø” (character 4): VII in capitals has a major third, a diminished chord has a minor one; write viiø7.'],
    ['v+', '1: Stopped at “+” (character 2): v in small letters has a minor third'],
    ['Vm7', '1: Stopped at “m” (character 2): a minor chord is written in small letters: v.'],
    ['viiø', '3: Stopped at “ø” (character 4): “ø” marks a half-diminished seventh chord'],
    ['viiø6', '4: Stopped at “6” (character 5): “ø” marks a half-diminished seventh chord'],
    ['V652', '3: Stopped at “2” (character 4): “652” names no chord'],
    ['V8', '1: Stopped at “8” (character 2): “8” names no chord'],
    ['V6/5b3', '4: Stopped at “b” (character 5): accidentals are read in ♭7'],
    ['vii7°', '4: Stopped at “°” (character 5): the marks ° ø + stand directly after the numeral'],
    ['Imaj', '1: Stopped at “m” (character 2): maj and dom name a seventh'],
    ['vii°maj7', '4: Stopped at “m” (character 5): the mark ° or ø says already'],
    ['vii°9', '4: Stopped at “9” (character 5): a ninth chord stands on'],
    ['I6sus4', '2: Stopped at “s” (character 3): the third is in the bass here'],
    ['Vsus2add9', '5: Stopped at “a” (character 6): the ninth is in the chord already'],
    ['V(add6', '6: Stopped at the end (after character 6): expected the closing bracket.'],
    ['V(foo)', '2: Stopped at “f” (character 3): expected add4'],
    ['V7(pass)', '3: Stopped at “p” (character 4): passing, pedal, arpeggiated and plain are kinds of the six-four chord.'],
    ['V7/', '3: Stopped at the end (after character 3): expected the numeral of the chord that is tonicised'],
    ['V7 of', '5: Stopped at the end (after character 5): expected the numeral'],
    ['V/8', '2: Stopped at “8” (character 3): expected the numeral of the chord that is tonicised'],
    ['V7/vii°', '6: Stopped at “°” (character 7): a diminished triad cannot be tonicised'],
    ['V7/III+', '6: Stopped at “+” (character 7): an augmented triad cannot be tonicised'],
    ['V7/V7', '4: Stopped at “7” (character 5): a target takes no figures'],
    ['N64x', '3: Stopped at “x” (character 4)'],
    ['N9', '1: Stopped at “9” (character 2): the Neapolitan is a major triad'],
    ['It7', '2: Stopped at “7” (character 3): these figures do not go with It; the usual ones are It6.'],
    ['Ger°7', '3: Stopped at “°” (character 4): a mark cannot follow Ger'],
    ['Ger65add6', '5: Stopped at “a” (character 6): this chord takes no added tones.'],
    ['CT7', '2: Stopped at “7” (character 3): the common-tone chord is a diminished seventh; expected CT°7.'],
    ['CT°6', '3: Stopped at “6” (character 4): the common-tone chord'],
    ['Cad6', '3: Stopped at “6” (character 4): the cadential chord is a six-four'],
    ['Ped6', '3: Stopped at “6” (character 4): expected the held degree'],
    ['Ped V/V', '6: Stopped at “V” (character 7): a pedal is a held tone of the key itself'],
    ['V?7', '2: Stopped at “7” (character 3): “?” leaves the chord on this root open'],
    ['bbbVI', '0: Stopped at “b” (character 1): no chord stands on a degree altered this far.'],
    ['♮VI', '0: Stopped at “♮” (character 1): the sign ♮ says nothing'],
    ['𝄫', '0: Stopped at “𝄫” (character 1)'],
  ])('%j at %s', (text, message) => {
    expect(stop(text)).toContain(message);
  });

  it.each([...'xyz!;:€𝄫'])('at trailing %j after a complete numeral', (junk) => {
    expect(stop(`vii°7/V${junk}`)).toMatch(/^7: Stopped at /);
  });
});

describe('parseNumeral under a sheet', () => {
  const { 'V64-slash-N6': dominant, 'I64-slash-N6': tonic, 'capitals-I64-of-N6': capitals } = CONVENTION_PRESETS;

  it.each([
    ['V64', dominant, 'Cad64'],
    ['V6/4', dominant, 'Cad64'],
    ['V64(plain)', dominant, 'V64'],
    ['V64(pass)', dominant, 'V64(pass)'],
    ['I64', dominant, 'I64'],
    ['I64', tonic, 'Cad64'],
    ['I64(plain)', tonic, 'I64'],
    ['V64', tonic, 'V64'],
    ['V64', DEFAULT_CONVENTIONS, 'V64'],
    ['I64', DEFAULT_CONVENTIONS, 'I64'],
    ['Cad64', dominant, 'Cad64'],
  ] as const)('%s reads by the sheet’s cadential form', (text, sheet, expected) => {
    expect(canonical(text, 'major', sheet)).toBe(expected);
  });

  it.each([
    ['II', 'major', 'ii'],
    ['II7', 'major', 'ii7'],
    ['VII7', 'major', 'viiø7'],
    ['VII°7', 'major', 'vii°7'],
    ['IVm', 'major', 'iv'],
    ['iv', 'major', 'iv'],
    ['IIM', 'major', 'II'],
    ['V7/II', 'major', 'V7/ii'],
    ['I', 'minor', 'i'],
    ['V', 'minor', 'V'],
    ['VII', 'minor', 'VII'],
    ['IVM', 'minor', 'IV'],
  ] as const)('capitals throughout: %s in %s is %s', (text, mode, expected) => {
    expect(canonical(text, mode, capitals)).toBe(expected);
  });

  it('capitals throughout refuse a target that is diminished in the key', () => {
    expect(stop('V7/VII', 'major', capitals)).toContain('a diminished triad cannot be tonicised');
  });

  it('accidentals from the major scale: ♭VI in minor is what VI is from the key', () => {
    const sheet = { ...DEFAULT_CONVENTIONS, accidentals: 'from-major' } as const;
    expect(['♭VI', '♭III', '♭VII7', 'vii°7', 'VI'].map((text) => canonical(text, 'minor', sheet))).toEqual(['VI', 'III', 'VII7', 'vii°7', '♯VI']);
  });

  it('borrowed chords without accidental: VI in major is ♭VI, ♮VI the major chord on the sixth', () => {
    const sheet = { ...DEFAULT_CONVENTIONS, accidentals: 'borrowed-plain' } as const;
    expect(['VI', '♮VI', '♭VI', 'vi', 'VII'].map((text) => canonical(text, 'major', sheet))).toEqual(['♭VI', 'VI', '♭VI', 'vi', '♭VII']);
  });

  it('half-diminished unmarked: vii7 in major and ii7 in minor', () => {
    const sheet = { ...DEFAULT_CONVENTIONS, halfDiminished: 'plain' } as const;
    expect([canonical('vii7', 'major', sheet), canonical('ii65', 'minor', sheet), canonical('ii7', 'major', sheet)]).toEqual(['viiø7', 'iiø65', 'ii7']);
  });
});

describe('parseNumeralReadings', () => {
  it('V64 is the sheet’s reading first, then the other one', () => {
    const texts = (sheet: ConventionSheet) => unwrap(parseNumeralReadings('V64', 'major', sheet)).map((one) => formatNumeral(one, 'major'));
    expect(texts(DEFAULT_CONVENTIONS)).toEqual(['V64', 'Cad64']);
    expect(texts(CONVENTION_PRESETS['V64-slash-N6'])).toEqual(['Cad64', 'V64']);
  });

  it('V65 is one numeral, and an unreadable text has the error of parseNumeral', () => {
    expect(unwrap(parseNumeralReadings('V65', 'major'))).toHaveLength(1);
    expect(parseNumeralReadings('V8', 'major')).toEqual(parseNumeral('V8', 'major'));
  });
});
