import { describe, expect, it } from 'vitest';
import { changeKey, changeKeyFrom, exchangeFrame, reframeNumeral, removeRegion } from '@/lib/harmony/edit-keys';
import { unwrap } from '@/lib/result';
import { parseKey } from '@/lib/theory/key';
import { formatNumeralPlain } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { spellNumeral } from '@/lib/theory/spell';
import { READING_TICKS, readingFrom } from '../../support/reading-notation';
import { numeralsOf } from '../../support/reading-edits';

const Q = READING_TICKS;
const key = (name: string) => unwrap(parseKey(name));

describe('reframeNumeral', () => {
  // Common practice, no source: one chord under its names in related keys.
  it.each([
    ['I', 'C major', 'G major', 'IV'],
    ['V7/V', 'C major', 'G major', 'V7'],
    ['vi', 'C major', 'a minor', 'i'],
    ['viio7/vi', 'C major', 'a minor', 'viio7'],
    ['V7', 'C major', 'a minor', 'V7/III'],
    ['bII', 'a minor', 'F major', 'IV'],
    ['IV', 'F major', 'a minor', 'N'],
  ])('reads %s of %s in %s as %s', (text, from, to, expected) => {
    const numeral = unwrap(parseNumeral(text, key(from).mode));
    const wanted = unwrap(parseNumeral(expected, key(to).mode));
    const read = reframeNumeral(numeral, key(from), key(to));
    const spelled = spellNumeral(key(to), read).tones.map((t) => t.fifths);
    expect(spelled).toEqual(spellNumeral(key(from), numeral).tones.map((t) => t.fifths));
    expect(spelled).toEqual(spellNumeral(key(to), wanted).tones.map((t) => t.fifths));
  });

  it('lets a cadential six-four be no tonic of another key', () => {
    const read = reframeNumeral(unwrap(parseNumeral('Cad64', 'major')), key('C major'), key('G major'));
    expect([formatNumeralPlain(read, 'major'), read.special]).toEqual(['IV64', null]);
  });
});

describe('changeKey', () => {
  it('keeps the sound of the labels in the span', () => {
    expect(numeralsOf(unwrap(changeKey(readingFrom('C: I V7/V V I'), Q, 3 * Q, key('G major'), 'sound')).reading)).toBe('C: I G: V7 I C: I');
  });

  it('keeps the numerals when asked', () => {
    expect(numeralsOf(unwrap(changeKey(readingFrom('C: I V I'), Q, 2 * Q, key('G major'), 'numerals')).reading)).toBe('C: I G: V C: I');
  });

  it('joins a region with a neighbour of its key', () => {
    const reading = readingFrom('C: I | G: V7 I | C: V I');
    expect(unwrap(changeKey(reading, Q, 3 * Q, key('C major'), 'sound')).reading.regions).toHaveLength(1);
  });

  it('refuses a span outside the excerpt', () => {
    expect(changeKey(readingFrom('C: I'), 0, 2 * Q, key('G major'), 'sound')).toMatchObject({ ok: false, error: { kind: 'boundary_outside' } });
  });
});

describe('changeKeyFrom', () => {
  it('holds to the next change of key', () => {
    expect(numeralsOf(unwrap(changeKeyFrom(readingFrom('C: I vi | G: V I'), Q, key('a minor'), 'sound')).reading)).toBe('C: I a: i G: V I');
  });
});

describe('removeRegion', () => {
  it('gives a region to the key before it', () => {
    expect(numeralsOf(unwrap(removeRegion(readingFrom('C: I | G: V7 I | C: I'), Q, 'sound')).reading)).toBe(`C: I ${numeralName('II7')} V I`);
  });

  it('leaves the only key alone', () => {
    expect(removeRegion(readingFrom('C: I'), 0, 'sound')).toMatchObject({ ok: false, error: { kind: 'nothing_changes' } });
  });
});

/** A major triad with minor seventh on the second, as the plain form prints it. */
function numeralName(text: string): string {
  return formatNumeralPlain(unwrap(parseNumeral(text, 'major')), 'major');
}

describe('exchangeFrame', () => {
  it('makes applied chords a region of their target', () => {
    const reading = readingFrom('C: I V7/V V I');
    expect(numeralsOf(unwrap(exchangeFrame(reading, reading.labels.slice(1, 3))).reading)).toBe('C: I G: V7 I C: I');
  });

  it('reads a region back into the key before it, its dominants applied', () => {
    const reading = readingFrom('C: I | G: V7 I | C: V I');
    expect(numeralsOf(unwrap(exchangeFrame(reading, reading.labels.slice(1, 3))).reading)).toBe('C: I V7/V V V I');
  });

  it('there and back is where it was', () => {
    const reading = readingFrom('C: I V65/V viio7/V V I');
    const there = unwrap(exchangeFrame(reading, reading.labels.slice(1, 4))).reading;
    const back = unwrap(exchangeFrame(there, there.labels.slice(1, 4))).reading;
    expect(numeralsOf(back)).toBe(numeralsOf(reading));
  });
});
