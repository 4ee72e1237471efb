import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Setting, compareWithKey } from '@/lib/marking/compare-with-key';
import { sumPoints } from '@/lib/marking/points';
import { RUBRIC_PRESETS, type Rubric } from '@/lib/marking/rubric';
import { SEGMENTATIONS } from '@/lib/marking/rubric';
import { READING_TICKS, keyReadingFrom, readingFrom } from '../../support/reading-notation';

const CHORDS = ['I', 'I6', 'ii', 'ii65', 'iii', 'IV', 'iv', 'V', 'V7', 'V43', 'vi', 'viio6', 'viiø7', 'viio7', 'V7/V', 'viio7/V', 'V65/IV',
  'viio7/vi', 'V42/ii', 'N6', 'Ger65', 'It6', 'Fr43', 'Cad64', 'bVI', 'CTo7'] as const;

const rubric = fc.constantFrom<Rubric>(...Object.values(RUBRIC_PRESETS).map((preset) => preset.rubric));
const setting = fc.record<Setting>({
  segmentation: fc.constantFrom(...SEGMENTATIONS),
  keysGiven: fc.boolean(),
  ticksPerQuarter: fc.constant(READING_TICKS),
});
const chord = fc.constantFrom<string>(...CHORDS, '_');
const length = fc.constantFrom(1, 2, 3);
const span = fc.record({ chord, length });
const passage = fc.array(span, { minLength: 1, maxLength: 12 });
const tonic = fc.constantFrom('C', 'G', 'Eb', 'f#');

function write(key: string, spans: readonly { chord: string; length: number }[]): string {
  // In minor ♭VI is VI; the vocabulary is for both modes.
  const text = (name: string) => (key === 'f#' && name === 'bVI' ? 'VI' : name);
  return `${key}: ${spans.map((s) => `${text(s.chord)}*${s.length}`).join(' ')}`;
}

describe('compareWithKey always', () => {
  it('gives a key full marks against itself', () => {
    fc.assert(
      fc.property(tonic, passage, rubric, setting, (key, spans, rules, how) => {
        const notation = write(key, spans);
        const marks = compareWithKey(keyReadingFrom(notation), readingFrom(notation), rules, how);
        expect(marks.every((mark) => mark.verdict === 'as-keyed' && mark.points === mark.maxPoints)).toBe(true);
        expect(marks).toHaveLength(spans.filter((s) => s.chord !== '_').length);
      }),
    );
  });

  it('keeps points between nought and full, in steps of the rubric, and full only for a whole credit', () => {
    fc.assert(
      fc.property(tonic, tonic, passage, passage, rubric, setting, (a, b, keyed, answered, rules, how) => {
        for (const mark of compareWithKey(keyReadingFrom(write(a, keyed)), readingFrom(write(b, answered)), rules, how)) {
          expect(mark.points).toBeGreaterThanOrEqual(0);
          expect(mark.points).toBeLessThanOrEqual(mark.maxPoints);
          expect(Math.abs(mark.points / rules.pointStep - Math.round(mark.points / rules.pointStep))).toBeLessThan(1e-6);
          expect(mark.points === mark.maxPoints).toBe(mark.credit >= 1);
        }
      }),
    );
  });

  it('does not lower any mark when a wrong or empty label is put right', () => {
    fc.assert(
      fc.property(tonic, passage, fc.array(chord, { minLength: 12, maxLength: 12 }), fc.nat(11), rubric, (key, spans, written, pick, rules) => {
        const how: Setting = { segmentation: 'given', keysGiven: true, ticksPerQuarter: READING_TICKS };
        const at = pick % spans.length;
        const answer = spans.map((s, i) => ({ ...s, chord: written[i] ?? '_' }));
        const better = answer.map((s, i) => (i === at ? { ...s, chord: spans[at]?.chord ?? '_' } : s));
        const total = (spansOf: typeof answer) =>
          compareWithKey(keyReadingFrom(write(key, spans)), readingFrom(write(key, spansOf)), rules, how);
        const [before, after] = [total(answer), total(better)];
        // The span itself never loses; a six-four before it can only gain its dominant, or lose one that was wrong.
        const own = spans.slice(0, at).reduce((sum, s) => sum + s.length * READING_TICKS, 0);
        const pointsAt = (marks: typeof before) => marks.find((mark) => mark.start === own)?.points ?? 0;
        expect(pointsAt(after)).toBeGreaterThanOrEqual(pointsAt(before));
        expect(sumPoints(after).maxPoints).toBe(sumPoints(before).maxPoints);
      }),
    );
  });

  it('never gives more for more faults in one label', () => {
    const worse: readonly (readonly [string, string, string])[] = [
      ['V65/V', 'V7/V', 'V/V'],
      ['V65/V', 'V65/IV', 'V7/IV'],
      ['viiø65', 'viio65', 'viio7'],
      ['ii65', 'ii6', 'ii'],
      ['Ger65', 'It6', 'V'],
    ];
    fc.assert(
      fc.property(fc.constantFrom(...worse), rubric, ([key, one, two], rules) => {
        const how: Setting = { segmentation: 'given', keysGiven: true, ticksPerQuarter: READING_TICKS };
        const points = (text: string) => compareWithKey(keyReadingFrom(`C: ${key}`), readingFrom(`C: ${text}`), rules, how)[0]?.credit ?? 0;
        expect(points(key)).toBe(1);
        expect(points(one)).toBeLessThanOrEqual(1);
        expect(points(two)).toBeLessThanOrEqual(points(one));
      }),
    );
  });

  it('does not look at ids, states or certainty of the answer', () => {
    fc.assert(
      fc.property(tonic, passage, passage, rubric, setting, (key, keyed, answered, rules, how) => {
        const answer = readingFrom(write(key, answered));
        const renamed = { ...answer, labels: answer.labels.map((l, i) => ({ ...l, id: `x${i}`, state: 'accepted' as const, certainty: 0.3 })) };
        const against = keyReadingFrom(write(key, keyed));
        expect(compareWithKey(against, renamed, rules, how)).toEqual(compareWithKey(against, answer, rules, how));
      }),
    );
  });
});
