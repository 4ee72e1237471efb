import { describe, expect, it } from 'vitest';
import { playChord, playReduction, playScore, voiceChord } from '@/components/sound/play-list';
import { framedFrom, readingFrom } from '../../../support/reading-notation';
import { scoreFrom } from '../../../support/notation';

// MIDI key numbers: 60 is middle C (c4), as the MIDI 1.0 specification numbers keys.
describe('playScore', () => {
  it('gives each note its key, its beginning and its length in quarters', () => {
    const { tones, length } = playScore(scoreFrom('C: c3 e4 *2 | a4'), { start: 0, end: 3 });
    expect(tones.map(({ midi, at }) => [midi, at])).toEqual([[48, 0], [64, 0], [69, 2]]);
    expect(length).toBe(3);
    expect(tones[0]!.length).toBeGreaterThan(1.9);
    expect(tones[0]!.length).toBeLessThan(2);
  });

  it('strikes a note held into the passage at its beginning, and cuts it at the end', () => {
    const { tones } = playScore(scoreFrom('C: c4 *4'), { start: 1, end: 2 });
    expect(tones).toHaveLength(1);
    expect(tones[0]).toMatchObject({ midi: 60, at: 0 });
    expect(tones[0]!.length).toBeLessThanOrEqual(1);
  });

  it('names the moments that go by', () => {
    expect(playScore(scoreFrom('C: c4 | - | e4'), { start: 0, end: 3 }).moments).toEqual([{ tick: 0, at: 0 }, { tick: 2, at: 2 }]);
  });
});

describe('voiceChord', () => {
  const classes = (text: string) => {
    const { key, numeral } = framedFrom(text);
    return voiceChord(key, numeral);
  };

  it.each([
    ['C: I', [0, 4, 7]],
    ['C: V65', [11, 2, 5, 7]],
    ['C: viio7/V', [6, 9, 0, 3]],
    ['G: I', [7, 11, 2]],
  ])('%s sounds these pitch classes from the bass up', (text, expected) => {
    expect(classes(text).map((midi) => midi % 12)).toEqual(expected);
  });

  it('keeps the bass lowest, the others within an octave and a half above the tenor', () => {
    for (const text of ['C: I', 'B: I', 'Gb: IV6', 'f#: V7', 'E: V42']) {
      const [bass, ...upper] = classes(text);
      expect(Math.min(...upper)).toBeGreaterThan(bass as number);
      expect(Math.max(...upper)).toBeLessThanOrEqual(55 + 18);
      expect([...upper].sort((a, b) => a - b)).toEqual(upper);
    }
  });
});

describe('playReduction', () => {
  const score = scoreFrom('C: c4 *4 | g3 *4 | c4 *4');
  const { labels } = readingFrom('C: I*4 _*4 I*4');

  it('sounds every label for its span, and a blank not at all', () => {
    // The score's ticks are quarters here, the reading's notation has four to the quarter.
    const own = labels.map((label) => ({ ...label, start: label.start / 4, end: label.end / 4 })) as unknown as typeof labels;
    const { tones, moments, length } = playReduction(score, own, { start: 0, end: 12 });
    expect([...new Set(tones.map((t) => t.at))]).toEqual([0, 8]);
    expect(moments.map((m) => m.tick)).toEqual([0, 4, 8]);
    expect(length).toBe(12);
  });

  it('is one chord for a label', () => {
    const { key, numeral } = framedFrom('a: V');
    expect(playChord(key, numeral).tones.map((t) => t.midi % 12)).toEqual([4, 8, 11]);
  });
});
