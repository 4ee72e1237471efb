import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { keyOfNumeral, reduceApplied } from '@/lib/theory/applied';
import { TEMPLATES } from '@/lib/theory/chord';
import { stepsUp } from '@/lib/theory/interval';
import { type Key, KEYS, fifthsOfDegree, formatKey } from '@/lib/theory/key';
import { nameChord } from '@/lib/theory/name-chord';
import type { Numeral } from '@/lib/theory/numeral';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { tendenciesOf } from '@/lib/theory/tendencies';
import { unwrap } from '@/lib/result';

import { anyKey, anyMode, anyNumeral, key, names, notes, numeral } from '../../support/numerals';

describe('spellNumeral', () => {
  it('spells every numeral in every key: bass first, letters upward, each tone once', () => {
    fc.assert(
      fc.property(anyKey, anyNumeral, (here, chord) => {
        const { tones, root, bass } = spellNumeral(here, chord);
        const heights = tones.map((tone) => stepsUp(bass, tone.fifths));
        expect(tones[0]?.fifths).toBe(bass);
        expect(heights.slice(0, -1)).toEqual(heights.slice(0, -1).toSorted((a, b) => a - b));
        expect(new Set(tones.map((tone) => tone.fifths)).size).toBe(tones.length);
        expect(tones.length).toBeGreaterThanOrEqual(TEMPLATES[chord.quality].length);
        expect(root).toBe(fifthsOfDegree(keyOfNumeral(here, chord), chord.degree));
      }),
      { numRuns: 2000 },
    );
  });

  it('is the same music in every key: transposing the key transposes every tone', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, fc.integer({ min: -7, max: 7 }), (chord, mode, by) => {
        const inC = spellNumeral({ tonic: fifths(0), mode }, chord).tones;
        const moved = spellNumeral({ tonic: fifths(by), mode }, chord).tones;
        expect(moved).toEqual(inC.map((tone) => ({ ...tone, fifths: tone.fifths + by })));
      }),
      { numRuns: 1000 },
    );
  });

  // Common practice, no source.
  it.each([
    ['C', 'V7/V/ii', 'E G# B D'],
    ['C', 'V65/V/ii', 'G# B D E'],
    ['c', 'V7/III', 'Bb D F Ab'],
    ['C', 'N6/ii', 'G Bb Eb'],
    ['C', 'Ger65/V', 'Eb G Bb C#'],
    ['C', 'V(sus4)', 'G C D'],
    ['C', 'V7(sus4)', 'G C D F'],
    ['c', 'V7(sus4)', 'G C D F'],
    ['C', 'I(add6)', 'C E G A'],
    ['C', 'I(add9)', 'C E G D'],
    ['C', 'ii7(add9)', 'D F A C E'],
    ['C', 'V9', 'G B D F A'],
    ['c', 'V9', 'G B D F Ab'],
    ['C', 'Ped', 'C'],
    ['C', 'Ped V', 'G'],
  ])('in %s, %s is %s', (name, text, spelled) => {
    expect(notes(name, text)).toBe(spelled);
  });

  it('names the role of each tone', () => {
    expect(spellNumeral(key('C'), numeral('C', 'V43(sus4)')).tones.map((tone) => tone.role)).toEqual(['fifth', 'seventh', 'root', 'fourth']);
    expect(spellNumeral(key('C'), numeral('C', 'Ger65')).tones.map((tone) => tone.role)).toEqual(['third', 'fifth', 'seventh', 'root']);
  });

  it('throws on an inversion that the chord does not have', () => {
    expect(() => spellNumeral(key('C'), { ...numeral('C', 'V'), inversion: 3 })).toThrow('no inversion 3');
  });
});

/** The chords a first-year course names, and the chromatic ones after it. */
const VOCABULARY = {
  major: 'I I6 I64 ii ii6 ii7 ii65 iii IV IV6 IV7 V V6 V64 V7 V65 V43 V42 V9 vi vi6 vi7 vii° vii°6 viiø7 viiø65 vii°7 iv iv6 ii° iiø7 iiø65 i ♭III ♭VI ♭VII V+ N6 It6 Fr43 Ger65 Sw43 CT°7 CT°7/V V/V V7/V V65/V V42/IV V7/ii V7/iii V7/vi V43/vi vii°7/ii vii°65/V viiø7/V viiø7/IV vii°/V vii°6/ii Ger65/V iiø7/iii',
  minor: 'i i6 i64 ii° ii°6 iiø7 iiø65 III III+ iv iv6 iv7 v V V6 V7 V65 V43 V42 V9 VI VI7 VII vii° vii°6 vii°7 vii°65 vii°43 vii°42 IV I N6 It6 Fr43 Ger65 V/V V7/V V7/III V65/iv V7/VI V7/VII vii°7/V vii°7/iv viiø7/III vii°7/VI CT°7',
} as const;

describe('nameChord', () => {
  it.each(KEYS.map((here) => [formatKey(here), here] as const))('finds every chord of the vocabulary from its notes in %s', (_, here: Key) => {
    for (const text of VOCABULARY[here.mode].split(' ')) {
      const { tones, bass } = spellNumeral(here, unwrap(parseNumeral(text, here.mode)));
      const found = nameChord(here, { bass, tones: tones.map((tone) => tone.fifths) }).map((one) => formatNumeral(one, here.mode));
      expect([text, found]).toEqual([text, expect.arrayContaining([text])]);
    }
  });

  it('gives only numerals that spell exactly these tones over this bass', () => {
    fc.assert(
      fc.property(anyKey, anyNumeral, (here, chord) => {
        const { tones, bass } = spellNumeral(here, { ...chord, applied: [] });
        const spelled = tones.map((tone) => tone.fifths).toSorted((a, b) => a - b);
        for (const found of nameChord(here, { bass, tones: spelled })) {
          const again = spellNumeral(here, found);
          expect(again.bass).toBe(bass);
          expect(again.tones.map((tone) => tone.fifths).toSorted((a, b) => a - b)).toEqual(spelled);
        }
      }),
      { numRuns: 500 },
    );
  });

  // Common practice, no source: what a teacher would say first.
  it.each([
    ['C', 'C E G', 'I'],
    ['C', 'G C E', 'Cad64'],
    ['C', 'D F# A', 'V/V'],
    ['C', 'C E G Bb', 'V7/IV'],
    ['C', 'B D F Ab', 'vii°7'],
    ['C', 'F Ab C', 'iv'],
    ['C', 'Ab C Eb', '♭VI'],
    ['C', 'E G# B', 'V/vi'],
    ['c', 'Bb D F Ab', 'V7/III'],
    ['c', 'Eb G Bb', 'III'],
    ['c', 'D F Ab', 'ii°'],
    ['Eb', 'F A C Eb', 'V7/V'],
    ['D', 'F# A C Eb', 'vii°7/IV'],
  ])('in %s calls %s %s first', (name, spelled, expected) => {
    expect(names(name, spelled)[0]).toBe(expected);
  });

  it('gives nothing for tones that make no chord', () => {
    expect(names('C', 'C D E')).toEqual([]);
    expect(names('C', 'C')).toEqual([]);
  });
});

describe('reduceApplied', () => {
  // Source: the report contract (shared/tools/README.md): in C major V7/V/ii has the target A major.
  it('V7/V/ii in C points at A major', () => {
    expect(reduceApplied(numeral('C', 'V7/V/ii'), 'major')).toEqual({ degree: { step: 5, alter: 0 }, applied: { degree: { step: 6, alter: 0 }, mode: 'major' } });
  });

  // Source: the same: a target that is the tonic in the mode of the key is null; VII in minor is {7, 0}.
  it.each([
    ['C', 'V7/I', null],
    ['C', 'V7', null],
    ['C', 'V7/IV/V', null],
    ['c', 'V7/i', null],
    ['C', 'vii°7/i', { degree: { step: 1, alter: 0 }, mode: 'minor' }],
    ['c', 'V7/VII', { degree: { step: 7, alter: 0 }, mode: 'major' }],
    ['c', 'V7/N', { degree: { step: 2, alter: -1 }, mode: 'major' }],
    ['C', 'V7/iv', { degree: { step: 4, alter: 0 }, mode: 'minor' }],
  ])('in %s, %s has the target %j', (name, text, target) => {
    expect(reduceApplied(numeral(name, text), key(name).mode).applied).toEqual(target);
  });

  it('keeps the chord: read in the reduced target, the root is the same', () => {
    fc.assert(
      fc.property(anyKey, anyNumeral, (here, chord) => {
        const { applied } = reduceApplied(chord, here.mode);
        const reduced = { ...chord, applied: applied ? [applied] : [] };
        expect(spellNumeral(here, reduced)).toEqual(spellNumeral(here, chord));
      }),
      { numRuns: 500 },
    );
  });
});

describe('tendenciesOf', () => {
  it('gives for every numeral in every key tones of the chord, each with a place to go and a sentence', () => {
    fc.assert(
      fc.property(anyKey, anyNumeral, (here, chord) => {
        const spelled = spellNumeral(here, chord).tones.map((tone) => tone.fifths);
        const { tones, targets } = tendenciesOf(here, chord);
        for (const tone of tones) {
          expect(spelled).toContain(tone.fifths);
          expect(tone.expected.length).toBeGreaterThan(0);
          expect(tone.expected).not.toContain(tone.fifths);
          expect(tone.reason).toMatch(/\.$/);
        }
        for (const target of targets) expect(spellNumeral(here, target).tones.length).toBeGreaterThanOrEqual(3);
      }),
      { numRuns: 1000 },
    );
  });

  it('every target of a dominant or leading-tone chord takes in where its leading tone goes', () => {
    for (const here of KEYS) {
      for (const text of VOCABULARY[here.mode].split(' ').filter((one) => /^(?:V|vii)/.test(one) && !/^VI/.test(one))) {
        const { tones, targets } = tendenciesOf(here, unwrap(parseNumeral(text, here.mode)));
        const resolution = tones.find((tone) => tone.kind === 'leading-tone')?.expected[0];
        expect([text, resolution]).not.toEqual([text, undefined]);
        expect([text, spellNumeral(here, targets[0] as Numeral).tones.map((tone) => tone.fifths)]).toEqual([text, expect.arrayContaining([resolution])]);
      }
    }
  });
});
