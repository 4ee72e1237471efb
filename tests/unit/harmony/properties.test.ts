import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { proposeReading } from '@/lib/harmony/propose';
import { type Reading } from '@/lib/harmony/reading';
import { validateReading } from '@/lib/harmony/validate';
import { type Note, type Score, ticks } from '@/lib/score/score';
import { type Pitch, LETTERS, fifths, letterOf } from '@/lib/theory/pitch';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { KEYS } from '@/lib/theory/key';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { unwrap } from '@/lib/result';
import { realise } from '../../support/chorale';
import { scoreFrom } from '../../support/notation';

// Common practice, no source: what must hold for any music.
const MUSIC = [
  'C: c3 e4 g4 c5 | d3 f4 a4 d5 | f#3 c4 a4 eb5 | g3 b3 g4 d5 | g3 c4 g4 e5 | g3 b3 f4 d5 | c3 c4 e4 c5 *2',
  'c: c3 eb4 g4 c5 | ab2 c4 eb4 f#4 | g2 b3 d4 g4 | c3 c4 eb4 g4 | f3 c4 f4 ab4 | d3 c4 f4 ab4 | g2 b3 f4 g4 | c3 c4 eb4 g4',
  'G 3/4: g2 b3 d4 g4 *2 | e3 b3 e4 g4 | a2 c4 e4 a4 *2 | d3 a3 c4 f#4 | g2 b3 d4 g4 *3',
] as const;

function transposeBy(pitch: Pitch, shift: number): Pitch {
  const f = fifths(pitch.fifths + shift);
  const place = LETTERS.indexOf(letterOf(pitch.fifths));
  const moved = LETTERS.indexOf(letterOf(f));
  return { fifths: f, octave: pitch.octave + (moved < place ? 1 : 0) };
}

/** The score a number of fifths higher on the line of fifths, every note up by less than an octave. */
function transposed(score: Score, shift: number): Score {
  return {
    ...score,
    notes: score.notes.map((note) => ({ ...note, pitch: transposeBy(note.pitch, shift) })),
    keySignatures: score.keySignatures.map((signature) => ({ ...signature, fifths: signature.fifths + shift })),
  };
}

function wordsOf(reading: Reading, shift = 0): readonly string[] {
  return reading.labels.map(({ start, end, key, numeral }) => `${start}-${end} ${key.tonic - shift} ${key.mode} ${numeral ? formatNumeral(numeral, key.mode) : '_'}`);
}

describe('proposeReading, whatever the music', () => {
  it('transposes with the score and changes nothing else', () => {
    fc.assert(
      fc.property(fc.constantFrom(...MUSIC), fc.integer({ min: -6, max: 6 }), (notation, shift) => {
        const score = scoreFrom(notation);
        expect(wordsOf(proposeReading(transposed(score, shift)), shift)).toEqual(wordsOf(proposeReading(score)));
      }),
      { numRuns: 12, seed: 4 },
    );
  });

  it('is not changed by a doubling at the octave above', () => {
    for (const notation of MUSIC) {
      const score = scoreFrom(notation);
      const top = score.notes.reduce((highest, note) => Math.max(highest, note.id), 0);
      const doubled = score.notes.map((note): Note => ({ ...note, id: note.id + top + 1, voice: `${note.voice}+`, pitch: { ...note.pitch, octave: note.pitch.octave + 2 } }));
      const notes = [...score.notes, ...doubled].sort((a, b) => a.start - b.start);
      expect(wordsOf(proposeReading({ ...score, notes }))).toEqual(wordsOf(proposeReading(score)));
    }
  });

  it('is not changed by writing a held note as two tied ones', () => {
    const score = scoreFrom(MUSIC[0]);
    const notes = score.notes.map((note) => (note.duration > 1 ? { ...note, attacks: [note.start, ticks(note.start + 1)] } : note));
    expect(wordsOf(proposeReading({ ...score, notes }))).toEqual(wordsOf(proposeReading(score)));
  });

  it('tiles every excerpt', () => {
    const score = scoreFrom(MUSIC[1]);
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 6 }), fc.integer({ min: 1, max: 8 }), (start, length) => {
        const reading = proposeReading(score, { start, end: Math.min(8, start + length) });
        expect(validateReading(reading)).toEqual([]);
      }),
      { numRuns: 20, seed: 4 },
    );
  });

  // Progressions of every textbook, common practice, no source.
  it.each([
    ['major', 'I IV V7 I'],
    ['major', 'I V6 I ii65 V7 I'],
    ['major', 'I ii6 Cad64 V7 I'],
    ['major', 'I V7/V V V7 I'],
    ['minor', 'i iv V7 i'],
    ['minor', 'i iiø65 V7 i'],
    ['minor', 'i V65 i Ger65 V i'],
    ['minor', 'i N6 V7 i'],
  ] as const)('reads a worked example in any %s key back as its numerals: %s', (mode, progression) => {
    const keys = KEYS.filter((key) => key.mode === mode);
    fc.assert(
      fc.property(fc.constantFrom(...keys), (key) => {
        const numerals = progression.split(' ').map((text) => unwrap(parseNumeral(text, mode)));
        const { labels } = proposeReading(realise(key, numerals));
        expect(labels.map(({ numeral }) => (numeral ? formatNumeral(numeral, mode) : '_'))).toEqual(numerals.map((numeral) => formatNumeral(numeral, mode)));
        expect(labels.every(({ key: found }) => found.tonic === key.tonic && found.mode === mode)).toBe(true);
      }),
      { numRuns: 10, seed: 4 },
    );
  });

  it('gives the same reading twice, whatever the music', () => {
    for (const notation of MUSIC) {
      const score = scoreFrom(notation);
      expect(proposeReading(score)).toEqual(proposeReading(score));
    }
  });
});
