import { describe, expect, it } from 'vitest';
import { proposeReading } from '@/lib/harmony/propose';
import { type Score } from '@/lib/score/score';
import { spellNumeral } from '@/lib/theory/spell';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { formatPitchClass } from '@/lib/theory/pitch';
import { scoreFrom } from '../support/notation';

/**
 * Openings out of copyright, encoded here from memory of the scores, with readings that the books agree on. What is
 * compared is what sounds (the chord's tones from the bass up), so that V7/V and V7 in the new key are the same.
 */
function chordAt(score: Score, quarter: number): string {
  const at = quarter * score.ticksPerQuarter;
  const label = proposeReading(score).labels.find(({ start, end }) => start <= at && at < end);
  return label?.numeral ? spellNumeral(label.key, label.numeral).tones.map((tone) => formatPitchClass(tone.fifths)).join(' ') : '_';
}

function numeralAt(score: Score, quarter: number): string {
  const at = quarter * score.ticksPerQuarter;
  const label = proposeReading(score).labels.find(({ start, end }) => start <= at && at < end);
  return label?.numeral ? formatNumeral(label.numeral, label.key.mode) : '_';
}

/** Five notes of a bar as the prelude plays them: two held below, three repeated above, twice a bar. */
function figure(notes: string): string {
  const [one, two, three, four, five] = notes.split(' ') as [string, string, string, string, string];
  const low = `~${one} ~${two}`;
  const half = [one, `~${one} ${two}`, ...[three, four, five, three, four, five].map((note) => `${low} ${note}`)];
  return [...half, ...half].map((sonority) => `${sonority} *1/4`).join(' | ');
}

describe('Bach, Prelude in C (BWV 846), bars 1–11', () => {
  const bars = [
    'c4 e4 g4 c5 e5', 'c4 d4 a4 d5 f5', 'b3 d4 g4 d5 f5', 'c4 e4 g4 c5 e5', 'c4 e4 a4 e5 a5', 'c4 d4 f#4 a4 d5',
    'b3 d4 g4 d5 g5', 'b3 c4 e4 g4 c5', 'a3 c4 e4 g4 c5', 'd3 a3 d4 f#4 c5', 'g3 b3 d4 g4 b4',
  ];
  const score = scoreFrom(`C: ${bars.map(figure).join(' | ')}`);
  // Source: the analysis in When in Rome (CC BY-SA 4.0), Bach, Well-Tempered Clavier I, prelude 1.
  it.each([
    [1, 'I', 'C E G'], [2, 'ii42', 'C D F A'], [3, 'V65', 'B D F G'], [4, 'I', 'C E G'], [5, 'vi6', 'C E A'], [6, 'V42/V', 'C D F# A'],
    [7, 'V6', 'B D G'], [8, 'IM42', 'B C E G'], [9, 'vi7', 'A C E G'], [10, 'V7/V', 'D F# A C'], [11, 'V', 'G B D'],
  ])('the middle of bar %i is %s', (bar, _, tones) => {
    expect(chordAt(score, 4 * (bar - 1) + 2)).toBe(tones);
  });
});

/** Triplets over a held bass, four to the bar. */
function triplets(bass: string, groups: readonly string[]): string {
  return groups
    .flatMap((group, g) => group.split(' ').map((note, i) => `${g + i === 0 ? bass : `~${bass}`} ${note} *1/3`))
    .join(' | ');
}

describe('Beethoven, Sonata op. 27 no. 2, bars 1–5', () => {
  const tonic = 'g#3 c#4 e4';
  const score = scoreFrom(
    `c#: ${[
      triplets('c#2', [tonic, tonic, tonic, tonic]),
      triplets('b1', [tonic, tonic, tonic, tonic]),
      triplets('a1', ['a3 c#4 e4', 'a3 c#4 e4']),
      triplets('f#1', ['a3 d4 f#4', 'a3 d4 f#4']),
      triplets('g#1', ['g#3 b#3 f#4', 'g#3 c#4 e4', 'g#3 c#4 d#4', 'f#3 b#3 d#4']),
      triplets('c#2', ['e3 g#3 c#4', 'g#3 c#4 e4', tonic, tonic]),
    ].join(' | ')}`,
  );
  // Traditional reading: i | (i42) | VI N6 | V7 with a six-four inside | i. The Neapolitan sixth is what the passage is quoted for.
  it.each([[0, 'C# E G#'], [8, 'A C# E'], [10, 'F# A D'], [16, 'C# E G#']])('the chord on quarter %i sounds %s', (quarter, tones) => {
    expect(chordAt(score, quarter)).toBe(tones);
  });

  it('names the Neapolitan sixth', () => {
    expect(numeralAt(score, 10)).toBe('N6');
  });
});

/** Four eighths of broken chord below, the melody held above: `melody` gives a note for every eighth, `~` holds it. */
function broken(left: string, melody: string): string {
  const upper = melody.split(' ');
  return left.split(' ').map((note, i) => `${note} ${upper[i]!} *1/2`).join(' | ');
}

describe('Mozart, Sonata K. 545, bars 1–4', () => {
  const score = scoreFrom(
    `C: ${[
      broken('c4 g4 e4 g4 c4 g4 e4 g4', 'c5 ~c5 ~c5 ~c5 e5 ~e5 g5 ~g5'),
      broken('d4 g4 f4 g4 c4 g4 e4 g4', 'b4 ~b4 ~b4 c5 c5 ~c5 ~c5 ~c5'),
      broken('c4 a4 f4 a4 c4 g4 e4 g4', 'a5 ~a5 ~a5 ~a5 g5 ~g5 c6 ~c6'),
      broken('b3 g4 d4 g4 c4 g4 e4 g4', 'g5 ~g5 f5 ~f5 e5 ~e5 ~e5 ~e5'),
    ].join(' | ')}`,
  );
  // Traditional reading: I | V43 I | IV64 (over the held bass) I | V6(5) I.
  it.each([[0, 'C E G'], [4, 'D F G B'], [6, 'C E G'], [8, 'C F A'], [10, 'C E G'], [14, 'C E G']])('the chord on quarter %i sounds %s', (quarter, tones) => {
    expect(chordAt(score, quarter)).toBe(tones);
  });
});

describe('Pachelbel, Canon in D, the ground', () => {
  const score = scoreFrom('D: d3 a4 d5 f#5 *2 | a2 a4 c#5 e5 *2 | b2 f#4 b4 d5 *2 | f#2 f#4 a4 c#5 *2 | g2 d4 g4 b4 *2 | d2 d4 f#4 a4 *2 | g2 d4 g4 b4 *2 | a2 e4 a4 c#5 *2 | d3 f#4 a4 d5 *4');
  it('is I V vi iii IV I IV V I', () => {
    expect(Array.from({ length: 9 }, (_, i) => numeralAt(score, 2 * i)).join(' ')).toBe('I V vi iii IV I IV V I');
  });
});
