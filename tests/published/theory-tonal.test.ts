// Source for every expected value in this file: the general library tonal (MIT), which spells by its own method.
import fc from 'fast-check';
import { Chord, Interval as TonalInterval, Key as TonalKey, Note } from 'tonal';
import { describe, expect, it } from 'vitest';

import { type Quality, TEMPLATES } from '@/lib/theory/chord';
import { type Interval, formatInterval, intervalBetween, semitonesOf, transpose } from '@/lib/theory/interval';
import { KEYS, type Key, signatureOf } from '@/lib/theory/key';
import { type Pitch, alterOf, fifths, formatPitchClass, letterOf, midiOf, parsePitchClass, pitchClassOf } from '@/lib/theory/pitch';

import { intervals, notes } from '../support/numerals';

/** F♭♭ to B𝄪. */
const anyPitch: fc.Arbitrary<Pitch> = fc.record({ fifths: fc.integer({ min: -15, max: 19 }).map(fifths), octave: fc.integer({ min: 1, max: 7 }) });
/** One accidental at most: tonal names no interval wider than quadruply augmented. */
const plainPitch: fc.Arbitrary<Pitch> = fc.record({ fifths: fc.integer({ min: -8, max: 12 }).map(fifths), octave: fc.integer({ min: 1, max: 7 }) });

function nameOf(pitch: Pitch): string {
  return formatPitchClass(pitch.fifths) + String(pitch.octave);
}

/** tonal writes the quality last: `-3M`. */
function tonalNameOf(interval: Interval): string {
  return formatInterval(interval).replace(/^(-?)([A-Zdm]+)(\d+)$/, '$1$3$2');
}

describe('pitches and intervals against tonal', () => {
  it('midiOf, pitchClassOf, letterOf, alterOf of any pitch', () => {
    fc.assert(
      fc.property(anyPitch, (pitch) => {
        const { midi, chroma, letter, alt } = Note.get(nameOf(pitch));
        expect([midiOf(pitch), pitchClassOf(pitch.fifths), letterOf(pitch.fifths), alterOf(pitch.fifths)]).toEqual([midi, chroma, letter, alt]);
      }),
    );
  });

  it('intervalBetween and formatInterval of any two pitches', () => {
    fc.assert(
      fc.property(plainPitch, plainPitch, (from, to) => {
        const expected = TonalInterval.distance(nameOf(from), nameOf(to));
        const interval = intervalBetween(from, to);
        const heard = (Note.midi(nameOf(to)) ?? 0) - (Note.midi(nameOf(from)) ?? 0);
        expect(semitonesOf(interval)).toBe(heard);
        // Where letters and sound part ways (E♯4–F♭4, C4–B♯3), tonal's name contradicts its own midi(): -7AA for a half step.
        fc.pre(expected !== '' && (interval.steps === 0 || interval.steps * heard > 0));
        expect([tonalNameOf(interval), semitonesOf(interval)]).toEqual([expected, TonalInterval.semitones(expected) + 0]);
      }),
      { numRuns: 2000 },
    );
  });

  it('transpose by any interval between two pitches', () => {
    fc.assert(
      fc.property(plainPitch, plainPitch, plainPitch, (start, from, to) => {
        const interval = intervalBetween(from, to);
        const expected = Note.transpose(nameOf(start), tonalNameOf(interval));
        fc.pre(expected !== '');
        expect(nameOf(transpose(start, interval))).toBe(expected);
      }),
      { numRuns: 2000 },
    );
  });

  it('the intervals within a chord: F♯ A C E♭', () => {
    const pairs = [['F#', 'A'], ['A', 'C'], ['C', 'Eb']] as const;
    expect(intervals('F# A C Eb')).toBe(pairs.map(([from, to]) => TonalInterval.distance(from, to).replace(/(\d)(\w)/, '$2$1')).join(' '));
  });
});

/** tonal's chord types for those of our qualities that it has; it has no augmented sixths. */
const CHORD_TYPES: Readonly<Partial<Record<Quality, string>>> = {
  major: 'M',
  minor: 'm',
  diminished: 'dim',
  augmented: 'aug',
  'dominant-seventh': '7',
  'major-seventh': 'maj7',
  'minor-seventh': 'm7',
  'half-diminished-seventh': 'm7b5',
  'diminished-seventh': 'dim7',
  'minor-major-seventh': 'mMaj7',
  'augmented-major-seventh': 'maj7#5',
  'augmented-seventh': '7#5',
  'dominant-ninth': '9',
  'dominant-minor-ninth': '7b9',
};
const ROOTS = Array.from({ length: 21 }, (_, i) => fifths(i - 8));

describe('chord templates against tonal', () => {
  it.each(Object.entries(CHORD_TYPES))('%s is spelled as tonal’s %s on every root from F♭ to B♯', (quality, type) => {
    for (const root of ROOTS) {
      const spelled = TEMPLATES[quality as Quality].map((distance) => formatPitchClass(fifths(root + distance)));
      expect(spelled).toEqual(Chord.getChord(type, formatPitchClass(root)).notes);
    }
  });
});

const MAJOR_KEYS = KEYS.filter((key) => key.mode === 'major').map((key) => formatPitchClass(key.tonic));
const MINOR_KEYS = KEYS.filter((key) => key.mode === 'minor').map((key) => formatPitchClass(key.tonic));

/** tonal's chord symbols, spelled by tonal. */
function spellSymbols(symbols: readonly string[]): string[] {
  return symbols.map((symbol) => Chord.get(symbol).notes.join(' '));
}

function spellAll(keyText: string, numerals: string): string[] {
  return numerals.split(' ').map((text) => notes(keyText, text));
}

describe('keys and their chords against tonal', () => {
  it('signatureOf of all thirty keys', () => {
    const ofTonal = ({ tonic, mode }: Key) => TonalKey[mode === 'major' ? 'majorKey' : 'minorKey'](formatPitchClass(tonic)).alteration;
    expect(KEYS.map(signatureOf)).toEqual(KEYS.map(ofTonal));
  });

  it.each(MAJOR_KEYS)('triads, unmarked sevenths and secondary dominants of %s major', (tonic) => {
    const expected = TonalKey.majorKey(tonic);
    expect(spellAll(`${tonic} major`, 'I ii iii IV V vi vii°')).toEqual(spellSymbols(expected.triads));
    expect(spellAll(`${tonic} major`, 'I7 ii7 iii7 IV7 V7 vi7 viiø7')).toEqual(spellSymbols(expected.chords));
    expect(spellAll(`${tonic} major`, 'V7/ii V7/iii V7/IV V7/V V7/vi')).toEqual(spellSymbols(expected.secondaryDominants.filter((symbol) => symbol !== '')));
  });

  it.each(MINOR_KEYS)('triads and unmarked sevenths of %s minor, natural and harmonic', (tonic) => {
    const { natural, harmonic } = TonalKey.minorKey(tonic);
    expect(spellAll(`${tonic} minor`, 'i ii° III iv v VI VII')).toEqual(spellSymbols(natural.triads));
    expect(spellAll(`${tonic} minor`, 'i7 iiø7 III7 iv7 v7 VI7 VII7')).toEqual(spellSymbols(natural.chords));
    expect(spellAll(`${tonic} minor`, 'i ii° III+ iv V VI vii°')).toEqual(spellSymbols(harmonic.triads));
    expect(spellAll(`${tonic} minor`, 'imaj7 iiø7 III+7 iv7 V7 VI7 vii°7')).toEqual(spellSymbols(harmonic.chords));
  });

  it('parsePitchClass reads what tonal names', () => {
    fc.assert(
      fc.property(anyPitch, ({ fifths: f }) => {
        expect(parsePitchClass(Note.get(formatPitchClass(f)).name)).toEqual({ ok: true, value: f });
      }),
    );
  });
});
