import { describe, expect, it } from 'vitest';
import { proposeReading } from '@/lib/harmony/propose';
import { type Label, type Reading } from '@/lib/harmony/reading';
import { validateReading } from '@/lib/harmony/validate';
import { type Score, ticks } from '@/lib/score/score';
import { formatKey } from '@/lib/theory/key';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { scoreFrom } from '../../support/notation';

/** `C major: I V65/V V` with a key wherever it changes. */
function wordsOf(reading: Reading): string {
  let key = '';
  return reading.labels
    .map((label) => {
      const name = formatKey(label.key);
      const prefix = name === key ? '' : `${name}: `;
      key = name;
      return prefix + (label.numeral ? formatNumeral(label.numeral, label.key.mode) : '_');
    })
    .join(' ');
}

const numerals = (notation: string) => wordsOf(proposeReading(scoreFrom(notation)));

// Common practice, no source: block chords whose reading nobody disputes.
describe('proposeReading', () => {
  it('reads the primary triads', () => {
    expect(numerals('C: c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5')).toBe('C major: I IV V I');
  });

  it('reads sevenths and inversions', () => {
    expect(numerals('G: g2 b3 d4 g4 | f#2 c4 d4 a4 | g2 b3 d4 g4 | c3 e4 g4 c5 | d3 c4 f#4 a4 | g2 b3 d4 g4 *2')).toBe('G major: I V65 I IV V7 I');
  });

  it('reads an applied leading-tone seventh and the cadential six-four', () => {
    const music = 'C: c3 e4 g4 c5 | d3 f4 a4 d5 | f#3 c4 a4 eb5 | g3 b3 g4 d5 | g3 c4 g4 e5 | g3 b3 f4 d5 | c3 c4 e4 c5 *2';
    expect(numerals(music)).toBe('C major: I ii vii°7/V V Cad64 V7 I');
  });

  it('reads a German sixth in minor', () => {
    expect(numerals('c: c3 eb4 g4 c5 | ab2 c4 eb4 f#4 | g2 b3 d4 g4 | c3 c4 eb4 g4')).toBe('C minor: i Ger65 V i');
  });

  it('hears a passing note as no chord of its own', () => {
    expect(numerals('C: c3 e4 g4 e5 *1/2 | ~c3 ~e4 ~g4 d5 *1/2 | ~c3 ~e4 ~g4 c5 | f3 c4 f4 a4 | g3 b3 f4 g4 | c3 c4 e4 g4')).toBe('C major: I IV V7 I');
  });

  it('hears the key, not the signature', () => {
    const music = 'D: g2 b3 d4 g4 | d3 a3 c4 f#4 | g2 b3 d4 g4 | c3 c4 e4 g4 | d3 a3 c4 f#4 | g2 b3 d4 g4 | c3 c4 e4 g4 | d3 a3 c4 f#4 | g2 g3 b3 d4 *4';
    expect(numerals(music)).toMatch(/^G major: /);
  });

  it('gives no labels to silence', () => {
    expect(proposeReading(scoreFrom('C: - | -')).labels).toEqual([]);
  });

  it('gives the same reading twice', () => {
    const score = scoreFrom('C: c3 e4 g4 c5 | d3 f4 a4 d5 | g3 b3 f4 d5 | c3 c4 e4 c5');
    expect(proposeReading(score)).toEqual(proposeReading(score));
  });

  it('tiles the excerpt it is asked for', () => {
    const score = scoreFrom('C: c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5 | a2 c4 e4 a4 | d3 d4 f4 a4 | g2 d4 f4 b4 | c3 c4 e4 c5');
    const reading = proposeReading(score, { start: 2, end: 7 });
    expect(validateReading(reading)).toEqual([]);
    expect([reading.start, reading.end]).toEqual([2, 7]);
  });

  it('gives every label at most five runners-up, all less likely together than one', () => {
    const { labels } = proposeReading(scoreFrom('C: c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5'));
    for (const label of labels) {
      expect(label.others.length).toBeLessThanOrEqual(5);
      expect(label.others.reduce((sum, other) => sum + other.certainty, label.certainty ?? 0)).toBeLessThanOrEqual(1 + 1e-6);
    }
  });
});

describe('proposeReading around fixed labels', () => {
  const score: Score = scoreFrom('C: c3 e4 g4 c5 | d3 f4 a4 d5 | f#3 c4 a4 d5 | g3 b3 g4 d5 | c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5');
  const free = proposeReading(score);

  it('keeps a fixed label exactly as it is', () => {
    const kept: Label = { ...free.labels[2]!, id: 'mine', state: 'changed', certainty: null, others: [] };
    const again = proposeReading(score, { fixed: [kept] });
    expect(again.labels).toContainEqual(kept);
    expect(validateReading(again)).toEqual([]);
  });

  it('lets the key follow from what a person fixed', () => {
    const inG: Label = {
      id: 'mine',
      start: ticks(3),
      end: ticks(4),
      key: { tonic: 1 as Label['key']['tonic'], mode: 'major' },
      numeral: { degree: { step: 1, alter: 0 }, quality: 'major', inversion: 0, applied: [], special: null, added: [] },
      state: 'changed',
      certainty: null,
      others: [],
    };
    const again = proposeReading(score, { fixed: [inG] });
    expect(again.labels.find(({ start }) => start === 3)).toEqual(inG);
    expect(validateReading(again)).toEqual([]);
  });

  it('keeps a blank that a person left', () => {
    const blank: Label = { ...free.labels[1]!, id: 'blank', numeral: null, state: 'changed', certainty: null, others: [] };
    expect(proposeReading(score, { fixed: [blank] }).labels).toContainEqual(blank);
  });
});

describe('proposeReading, asked again', () => {
  const notation = 'C: c3 e4 g4 c5 | d3 f4 a4 d5 | f#3 c4 a4 d5 | g3 b3 g4 d5 | c3 e4 g4 c5 | f3 f4 a4 c5 | g3 d4 g4 b4 | c3 e4 g4 c5';

  it('gives around its own label what it gave before', () => {
    const score = scoreFrom(notation);
    const free = proposeReading(score);
    const kept: Label = { ...free.labels[3]!, state: 'accepted' };
    expect(wordsOf(proposeReading(score, { fixed: [kept] }))).toBe(wordsOf(free));
  });

  it('gives the same whether the score was asked about before or not', () => {
    const asked = scoreFrom(notation);
    const kept: Label = { ...proposeReading(asked).labels[2]!, state: 'accepted' };
    expect(wordsOf(proposeReading(asked, { fixed: [kept] }))).toBe(wordsOf(proposeReading(scoreFrom(notation), { fixed: [kept] })));
  });

  it('does not take one excerpt for another', () => {
    const score = scoreFrom(notation);
    const whole = proposeReading(score);
    proposeReading(score, { start: 0, end: 4 });
    expect(proposeReading(score)).toEqual(whole);
  });
});
