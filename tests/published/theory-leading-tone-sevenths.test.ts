import { describe, expect, it } from 'vitest';

import { checkAppliedQuality } from '@/lib/theory/applied';
import { parseNumeral } from '@/lib/theory/numeral-parse';

import { intervals, key, names, notes, numeral, pulls, targets, tones } from '../support/numerals';

// Source: Open Music Theory v1 (CC BY-SA 4.0), "Functional dissonances"; Integrated Musicianship: Theory, ch. 14b.
const OF_THE_KEY: readonly [string, string, string][] = [
  ['C', 'viiø7', 'B D F A'],
  ['G', 'viiø7', 'F# A C E'],
  ['E', 'viiø7', 'D# F# A C#'],
  ['Eb', 'viiø7', 'D F Ab C'],
  ['Ab', 'viiø7', 'G Bb Db F'],
  ['c', 'vii°7', 'B D F Ab'],
  ['g', 'vii°7', 'F# A C Eb'],
  ['d', 'vii°7', 'C# E G Bb'],
  ['a', 'vii°7', 'G# B D F'],
  ['e', 'vii°7', 'D# F# A C'],
  ['b', 'vii°7', 'A# C# E G'],
  ['f#', 'vii°7', 'E# G# B D'],
  ['c#', 'vii°7', 'B# D# F# A'],
  ['f', 'vii°7', 'E G Bb Db'],
  ['bb', 'vii°7', 'A C Eb Gb'],
  ['eb', 'vii°7', 'D F Ab Cb'],
  ['ab', 'vii°7', 'G Bb Db Fb'],
  ['db', 'vii°7', 'C Eb Gb Bbb'],
];

// Source: Integrated Musicianship: Theory, ch. 14b–c; Open Music Theory v1, "Applied chords".
const SECONDARY: readonly [string, string, string][] = [
  ['C', 'vii°7/ii', 'C# E G Bb'],
  ['C', 'vii°7/iii', 'D# F# A C'],
  ['C', 'vii°7/IV', 'E G Bb Db'],
  ['C', 'vii°7/V', 'F# A C Eb'],
  ['C', 'viiø7/V', 'F# A C E'],
  ['C', 'vii°7/vi', 'G# B D F'],
  ['D', 'vii°7/ii', 'D# F# A C'],
  ['D', 'vii°7/iii', 'E# G# B D'],
  ['D', 'vii°7/IV', 'F# A C Eb'],
  ['D', 'vii°7/V', 'G# B D F'],
  ['D', 'vii°7/vi', 'A# C# E G'],
  ['A', 'vii°7/ii', 'A# C# E G'],
  ['A', 'vii°7/V', 'D# F# A C'],
  ['A', 'vii°7/vi', 'E# G# B D'],
  ['E', 'vii°7/iii', 'F## A# C# E'],
  ['E', 'vii°7/V', 'A# C# E G'],
  ['E', 'vii°7/vi', 'B# D# F# A'],
  ['Eb', 'vii°7/ii', 'E G Bb Db'],
  ['Eb', 'vii°7/IV', 'G Bb Db Fb'],
  ['Eb', 'vii°7/V', 'A C Eb Gb'],
  ['Eb', 'vii°7/vi', 'B D F Ab'],
  ['Ab', 'vii°7/ii', 'A C Eb Gb'],
  ['Ab', 'vii°7/IV', 'C Eb Gb Bbb'],
  ['Ab', 'vii°7/V', 'D F Ab Cb'],
  ['c', 'vii°7/III', 'D F Ab Cb'],
  ['c', 'vii°7/iv', 'E G Bb Db'],
  ['c', 'vii°7/V', 'F# A C Eb'],
  ['c', 'vii°7/VI', 'G Bb Db Fb'],
  ['c', 'vii°7/VII', 'A C Eb Gb'],
  ['f#', 'vii°7/V', 'B# D# F# A'],
  ['f#', 'vii°7/iv', 'A# C# E G'],
  ['bb', 'vii°7/V', 'E G Bb Db'],
  ['bb', 'vii°7/III', 'C Eb Gb Bbb'],
];

describe('leading-tone sevenths of the key', () => {
  it.each(OF_THE_KEY)('in %s, %s is %s, both ways', (tonic, text, spelled) => {
    expect(notes(tonic, text)).toBe(spelled);
    expect(names(tonic, spelled)[0]).toBe(text);
  });

  // Source: Open Music Theory v1, "Functional dissonances": root up a half step, fifth down, seventh down by step.
  it.each([
    ['C', 'viiø7', 'B>C F>E A>G'],
    ['c', 'vii°7', 'B>C F>Eb Ab>G'],
    ['E', 'viiø7', 'D#>E A>G# C#>B'],
    ['f#', 'vii°7', 'E#>F# B>A D>C#'],
    ['ab', 'vii°7', 'G>Ab Db>Cb Fb>Eb'],
  ])('in %s, %s resolves %s', (tonic, text, resolution) => {
    expect(pulls(tonic, text)).toBe(resolution);
  });

  // From memory: 6/5→I6, 4/3→I6, 4/2→I6/4 or V (4/2 to the cadential six-four: Integrated Musicianship: Theory, ch. 20a).
  it.each([
    ['vii°7', 'i'],
    ['vii°65', 'i6'],
    ['vii°43', 'i6'],
    ['vii°42', 'i64'],
    ['vii°42', 'V'],
  ])('%s in minor leads to %s', (text, target) => {
    expect(targets('c', text).split(' ')).toContain(target);
  });

  // Common practice, no source: half-diminished m3 m3 M3, fully diminished m3 m3 m3.
  it.each([
    ['B D F A', 'm3 m3 M3'],
    ['B D F Ab', 'm3 m3 m3'],
  ])('%s is built of %s', (spelled, thirds) => {
    expect(intervals(spelled)).toBe(thirds);
  });

  // Source: Open Music Theory v1, "Functional dissonances": vii° is V7 without its root.
  it('vii° is V7 without its root', () => {
    expect(notes('C', 'V65').split(' ').filter((tone) => tone !== 'G').join(' ')).toBe(notes('C', 'vii°'));
  });
});

describe('secondary leading-tone sevenths', () => {
  it.each(SECONDARY)('in %s, %s is %s, both ways', (tonic, text, spelled) => {
    expect(notes(tonic, text)).toBe(spelled);
    expect(names(tonic, spelled)[0]).toBe(text);
  });

  it.each(SECONDARY)('in %s, %s (%s) has its root a half step below the target’s and keeps the rule of quality', (tonic, text) => {
    const [, target = ''] = text.split('/');
    const [leadingTone = ''] = notes(tonic, text).split(' ');
    const [root = ''] = notes(tonic, target).split(' ');
    expect(intervals(`${leadingTone} ${root}`)).toBe('m2');
    expect(checkAppliedQuality(key(tonic), numeral(tonic, text))).toEqual([]);
  });

  // Source: Integrated Musicianship: Theory, ch. 14b–c: a major target takes both sevenths, a minor one the fully diminished.
  it.each([
    ['C', 'viiø7/V', []],
    ['C', 'viiø7/IV', []],
    ['C', 'viiø7/ii', ['half-diminished-of-minor']],
    ['C', 'viiø65/vi', ['half-diminished-of-minor']],
    ['c', 'viiø7/iv', ['half-diminished-of-minor']],
    ['c', 'viiø7/III', []],
    ['C', 'vii°7/vii', ['target-diminished-in-key']],
    ['c', 'V7/ii', ['target-diminished-in-key']],
  ])('checkAppliedQuality in %s of %s finds %j', (tonic, text, codes) => {
    expect(checkAppliedQuality(key(tonic), numeral(tonic, text)).map((finding) => finding.code)).toEqual(codes);
  });

  // Source: the same: never a diminished target.
  it('parseNumeral refuses vii°7/ii° and V7/vii°', () => {
    expect(parseNumeral('vii°7/ii°', 'minor').ok).toBe(false);
    expect(parseNumeral('V7/vii°', 'major').ok).toBe(false);
  });

  // Source: Open Music Theory v1, "Applied chords".
  it('F♯°–G–C in C is vii°/V–V–I, and F7 in E♭ is V7/V, not II7', () => {
    expect(['F# A C', 'G B D', 'C E G'].map((spelled) => names('C', spelled)[0])).toEqual(['vii°/V', 'V', 'I']);
    expect(names('Eb', 'F A C Eb')[0]).toBe('V7/V');
  });

  // Common practice, no source.
  it.each([
    ['C', 'F# A C E', 'viiø7/V', 'F#>G C>B E>D', 'V'],
    ['c', 'E G Bb Db', 'vii°7/iv', 'E>F Bb>Ab Db>C', 'iv'],
    ['D', 'F# A C Eb', 'vii°7/IV', 'F#>G C>B Eb>D', 'IV'],
    ['F', 'B D F Ab', 'vii°7/V', 'B>C F>E Ab>G', 'V'],
    ['F', 'B D F G#', 'vii°65/iii', 'D>C F>E G#>A', 'iii6'],
  ])('in %s, %s is %s, resolves %s and goes to %s', (tonic, spelled, text, resolution, target) => {
    expect(names(tonic, spelled)).toContain(text);
    expect(pulls(tonic, text)).toBe(resolution);
    expect(targets(tonic, text).split(' ')[0]).toBe(target);
  });

  // Common practice, no source: over B♭ it is vii°4/3 of the tonic itself, not secondary.
  it('in F major, E-G-B♭-D♭ over B♭ is vii°43', () => {
    expect(names('F', 'Bb Db E G')[0]).toBe('vii°43');
  });

  // Common practice, no source: how many tones of E-G-B♭-D♭ lie outside c minor.
  it('vii°7/iv in c minor has two chromatic alterations', () => {
    const natural = new Set(tones('C D Eb F G Ab Bb'));
    expect(tones(notes('c', 'vii°7/iv')).filter((tone) => !natural.has(tone))).toHaveLength(2);
  });
});
