import { describe, expect, it } from 'vitest';

import { sizeOf } from '@/lib/theory/chord';
import { CONVENTION_PRESETS, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { enharmonicReadings } from '@/lib/theory/enharmonic';
import { formatKey } from '@/lib/theory/key';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { formatPitchClass } from '@/lib/theory/pitch';
import { typesetAfter, typesetNumeral } from '@/lib/theory/typeset';

import { intervals, key, names, notes, numeral, pulls, targets } from '../support/numerals';

/** A major key and the minor key on the same tonic. */
function bothModes(tonic: string): [string, string] {
  return [tonic, tonic.charAt(0).toLowerCase() + tonic.slice(1)];
}

describe('augmented sixths', () => {
  // Source: Open Music Theory v1 (CC BY-SA 4.0), "Altered subdominant chords"; Integrated Musicianship: Theory, ch. 18a.
  // Tonic; Italian; French; German, the flat sixth in the bass; the root of the dominant they lead to.
  const TABLE: readonly [string, string, string, string, string][] = [
    ['C', 'Ab C F#', 'Ab C D F#', 'Ab C Eb F#', 'G'],
    ['G', 'Eb G C#', 'Eb G A C#', 'Eb G Bb C#', 'D'],
    ['D', 'Bb D G#', 'Bb D E G#', 'Bb D F G#', 'A'],
    ['A', 'F A D#', 'F A B D#', 'F A C D#', 'E'],
    ['E', 'C E A#', 'C E F# A#', 'C E G A#', 'B'],
    ['F#', 'D F# B#', 'D F# G# B#', 'D F# A B#', 'C#'],
    ['F', 'Db F B', 'Db F G B', 'Db F Ab B', 'C'],
    ['Bb', 'Gb Bb E', 'Gb Bb C E', 'Gb Bb Db E', 'F'],
    ['Eb', 'Cb Eb A', 'Cb Eb F A', 'Cb Eb Gb A', 'Bb'],
  ];
  const ROWS = TABLE.flatMap(([tonic, it6, fr43, ger65, dominant]) =>
    bothModes(tonic).flatMap((name) => [
      [name, 'It6', it6, dominant] as const,
      [name, 'Fr43', fr43, dominant] as const,
      [name, 'Ger65', ger65, dominant] as const,
    ]),
  );

  it.each(ROWS)('in %s, %s is %s, both ways, and leads to %s', (name, text, spelled, dominant) => {
    expect(notes(name, text)).toBe(spelled);
    expect(names(name, spelled)[0]).toBe(text);
    expect(targets(name, text).split(' ')).toContain('V');
    expect(notes(name, 'V').split(' ')[0]).toBe(dominant);
  });

  // Source: the same: le falls to sol, fi rises to sol, both a half step.
  it.each(ROWS)('in %s, %s (%s) closes on %s from both sides', (name, text, spelled, dominant) => {
    const flatSixth = spelled.split(' ')[0] as string;
    const raisedFourth = spelled.split(' ').at(-1) as string;
    expect(intervals(`${dominant} ${flatSixth}`)).toBe('m2');
    expect(intervals(`${raisedFourth} ${dominant}`)).toBe('m2');
    expect(pulls(name, text)).toMatch(new RegExp(`^${flatSixth}>${dominant} .*${raisedFourth}>${dominant}$`));
  });

  // Source: Open Music Theory v1, the same chapter: the Swiss sixth in major.
  it('Sw43 in C is A♭-C-D♯-F♯, both ways', () => {
    expect(notes('C', 'Sw43')).toBe('Ab C D# F#');
    expect(names('C', 'Ab C D# F#')[0]).toBe('Sw43');
  });

  // Source: the same: the German goes through the six-four; to V7, fi may fall to fa.
  it('Ger65 leads to the six-four first, It6 and Fr43 to V; fi may fall to fa', () => {
    expect([targets('C', 'Ger65'), targets('C', 'It6'), targets('c', 'Fr43')]).toEqual(['Cad64 V V7', 'V V7 Cad64', 'V V7 Cad64']);
  });

  // Source: the same: with the flat sixth in the bass It has a 6, Fr 4/3, Ger 6/5.
  it.each([
    ['It6', ['6']],
    ['Fr43', ['4', '3']],
    ['Ger65', ['6', '5']],
  ])('%s is set with the figures %j', (text, figures) => {
    expect(typesetNumeral(numeral('C', text), 'major').figures).toEqual(figures);
  });
});

describe('Neapolitan', () => {
  // Source: Open Music Theory v1, "Altered subdominant chords"; Integrated Musicianship: Theory, ch. 16b. Bass first.
  const TABLE: readonly [string, string][] = [
    ['C', 'F Ab Db'],
    ['c', 'F Ab Db'],
    ['g', 'C Eb Ab'],
    ['d', 'G Bb Eb'],
    ['a', 'D F Bb'],
    ['e', 'A C F'],
    ['b', 'E G C'],
    ['f#', 'B D G'],
    ['f', 'Bb Db Gb'],
    ['bb', 'Eb Gb Cb'],
  ];

  it.each(TABLE)('N6 in %s is %s, both ways', (name, spelled) => {
    expect(notes(name, 'N6')).toBe(spelled);
    expect(names(name, spelled)[0]).toBe('N6');
    expect(parseNumeral('♭II6', key(name).mode)).toEqual(parseNumeral('N6', key(name).mode));
    expect(typesetNumeral(numeral(name, 'N6'), key(name).mode).figures).toEqual(['6']);
  });

  // Source: the same: ra falls to ti in V, or goes to do in the six-four or in vii°7/V.
  it('N6 in c leads to V, the six-four and vii°7/V, D♭ to B or C', () => {
    expect(targets('c', 'N6')).toBe('V V7 Cad64 vii°7/V');
    expect(pulls('c', 'N6')).toBe('Ab>G Db>B|C');
  });
});

describe('six-four chords', () => {
  // Source: Open Music Theory v1, "Cadence types"; Integrated Musicianship: Theory, ch. 11d: G-C-E → G-B-D.
  it('Cad64 in C is G-C-E, falls 6–5 and 4–3, and leads to V and V7', () => {
    expect(notes('C', 'Cad64')).toBe('G C E');
    expect(names('C', 'G C E')[0]).toBe('Cad64');
    expect(pulls('C', 'Cad64')).toBe('C>B E>D');
    expect(targets('C', 'Cad64')).toBe('V V7');
  });

  it('each convention prints and reads the same cadential six-four', () => {
    const cadential = numeral('C', 'Cad64');
    const printed = (['V64-slash-N6', 'I64-slash-N6', 'cad64-slash-N6'] as const).map((name) => [
      formatNumeral(cadential, 'major', CONVENTION_PRESETS[name]),
      parseNumeral(formatNumeral(cadential, 'major', CONVENTION_PRESETS[name]), 'major', CONVENTION_PRESETS[name]),
    ]);
    const read = { ok: true, value: cadential };
    expect(printed).toEqual([['V64', read], ['I64', read], ['Cad64', read]]);
  });

  // Source: Open Music Theory v1, "Cadence types": 8/6/4 goes to 8/5/3 or 7/5/3, and one numeral stands for both.
  it.each([
    ['V', ['5', '3']],
    ['V7', ['7', '5', '3']],
  ])('after V6/4 the label %s shows %j alone', (text, figures) => {
    const sheet = { ...DEFAULT_CONVENTIONS, cadential: 'dominant' } as const;
    expect(typesetNumeral(numeral('C', 'Cad64'), 'major', sheet)).toMatchObject({ letters: 'V', figures: ['6', '4'], runsOn: true });
    expect(typesetAfter(numeral('C', 'Cad64'), numeral('C', text), 'major', sheet)).toMatchObject({ letters: '', figures });
  });

  // Source: the same: passing in V–ii6/4–V and I–V6/4–I6, pedal in I–IV6/4–I, arpeggiated.
  it.each([
    ['ii64(pass)', 'passing-six-four', 'A D F'],
    ['V64(pass)', 'passing-six-four', 'D G B'],
    ['IV64(ped)', 'pedal-six-four', 'C F A'],
    ['I64(arp)', 'arpeggiated-six-four', 'G C E'],
  ])('%s in C is the %s %s', (text, special, spelled) => {
    expect(numeral('C', text).special).toBe(special);
    expect(notes('C', text)).toBe(spelled);
  });
});

describe('mixture', () => {
  // Source: Open Music Theory v1, "Modal mixture"; Integrated Musicianship: Theory, ch. 16a.
  it.each([
    ['C', 'iv', 'F Ab C'],
    ['C', 'iiø7', 'D F Ab C'],
    ['C', '♭VI', 'Ab C Eb'],
    ['C', '♭III', 'Eb G Bb'],
    ['C', '♭VII', 'Bb D F'],
    ['D', 'iv', 'G Bb D'],
    ['D', '♭VI', 'Bb D F'],
    ['Eb', 'iv', 'Ab Cb Eb'],
    ['Eb', '♭VI', 'Cb Eb Gb'],
  ])('in %s, %s is %s, both ways', (name, text, spelled) => {
    expect(notes(name, text)).toBe(spelled);
    expect(names(name, spelled)[0]).toBe(text);
    expect(typesetNumeral(numeral(name, text), 'major').figures).toEqual(sizeOf(numeral(name, text).quality) === 4 ? ['7'] : []);
  });

  it('the Picardy third in c is I, C-E-G, both ways', () => {
    expect(notes('c', 'I')).toBe('C E G');
    expect(names('c', 'C E G')).toContain('I');
  });

  // Source: the same: raised 6 and 7 in minor are not mixture, so they carry no accidental.
  it.each([
    ['IV', 'F A C'],
    ['V', 'G B D'],
    ['vii°', 'B D F'],
    ['vi°', 'A C Eb'],
    ['VI', 'Ab C Eb'],
    ['VII', 'Bb D F'],
  ])('%s in c minor is %s, both ways', (text, spelled) => {
    expect(notes('c', text)).toBe(spelled);
    expect(names('c', spelled)).toContain(text);
  });
});

describe('common-tone diminished sevenths', () => {
  // Source: Integrated Musicianship: Theory, ch. 18b.
  it.each([
    ['C', 'CT°7', 'D# F# A C', 'I', 'D#>E F#>G A>G'],
    ['C', 'CT°7/V', 'A# C# E G', 'V', 'A#>B C#>D E>D'],
    ['A', 'CT°7', 'B# D# F# A', 'I', 'B#>C# D#>E F#>E'],
    ['F', 'CT°7', 'G# B D F', 'I', 'G#>A B>C D>C'],
  ])('in %s, %s is %s, both ways, goes to %s by step and keeps its root', (name, text, spelled, target, resolution) => {
    expect(notes(name, text)).toBe(spelled);
    expect(names(name, spelled)).toContain(text);
    expect(targets(name, text)).toBe(target);
    expect(pulls(name, text)).toBe(resolution);
    expect(spelled.split(' ')).toContain(notes(name, target).split(' ')[0]);
  });

  // Source: the same: D♯°7 before C is common-tone, before e it is vii°7/iii.
  it('D♯-F♯-A-C in C can be CT°7 and vii°7/iii', () => {
    expect(names('C', 'D# F# A C')).toEqual(expect.arrayContaining(['CT°7', 'vii°7/iii']));
    expect(targets('C', 'vii°7/iii').split(' ')[0]).toBe('iii');
  });

  // Source: the same: labelled CT°7, without figures for the inversion.
  it('CT°7 is set as CT°7 in every inversion', () => {
    const inverted = { ...numeral('C', 'CT°7'), inversion: 2 } as const;
    expect(typesetNumeral(inverted, 'major')).toMatchObject({ letters: 'CT', mark: '°', figures: ['7'] });
  });
});

describe('enharmonic readings', () => {
  /** `C minor vii°7 B D F Ab` for each reading. */
  function readings(name: string, text: string): string[] {
    return enharmonicReadings(key(name), numeral(name, text)).map(({ key: other, numeral: read, chord }) =>
      [formatKey(other), formatNumeral(read, other.mode), ...chord.tones.map((tone) => formatPitchClass(tone.fifths))].join(' '),
    );
  }

  // Source: Integrated Musicianship: Theory, ch. 20a.
  const FOUR = ['C minor vii°7 B D F Ab', 'A minor vii°65 B D F G#', 'F# minor vii°43 B D E# G#', 'Eb minor vii°42 Cb D F Ab'];

  it.each([
    ['c', 'vii°7'],
    ['a', 'vii°65'],
    ['f#', 'vii°43'],
    ['eb', 'vii°42'],
  ])('B-D-F-A♭ from %s, where it is %s, is a leading-tone seventh in the same four keys', (name, text) => {
    expect(readings(name, text).toSorted()).toEqual(FOUR.toSorted());
  });

  it.each([
    ['c', 'vii°7', 'B D F Ab'],
    ['a', 'vii°65', 'B D F G#'],
    ['f#', 'vii°43', 'B D E# G#'],
    ['eb', 'vii°42', 'Cb D F Ab'],
  ])('in %s, %s is %s, both ways', (name, text, spelled) => {
    expect(notes(name, text)).toBe(spelled);
    expect(names(name, spelled)[0]).toBe(text);
  });

  // Source: the same: V7 in C, GBDF, is the German sixth in B, GBDE♯; the German sixth in C is V7 of D♭.
  it('V7 and the German sixth sound alike', () => {
    expect(readings('C', 'V7')).toEqual(['B major Ger65 G B D E#']);
    expect(readings('C', 'Ger65')).toEqual(['Db major V7 Ab C Eb Gb']);
    expect(readings('c', 'iv')).toEqual([]);
  });
});
