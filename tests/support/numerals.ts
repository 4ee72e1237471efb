import fc from 'fast-check';

import { QUALITIES, type Quality, isAugmentedSixth, sizeOf } from '@/lib/theory/chord';
import {
  ACCIDENTAL_FORMS,
  APPLIED_FORMS,
  AUGMENTED_SIXTH_FORMS,
  CADENTIAL_FORMS,
  CASE_FORMS,
  type ConventionSheet,
  FIGURE_STYLES,
  HALF_DIMINISHED_FORMS,
  NEAPOLITAN_FORMS,
} from '@/lib/theory/conventions';
import { formatPitchClassInterval } from '@/lib/theory/interval';
import { type Degree, type Key, KEYS, MODES, STEPS, parseKey } from '@/lib/theory/key';
import { ADDED_TONES, type Numeral, type Special, checkNumeral, degreeOfAugmentedSixth } from '@/lib/theory/numeral';
import { nameChord } from '@/lib/theory/name-chord';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { type Fifths, formatPitchClass, parsePitchClass } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { tendenciesOf } from '@/lib/theory/tendencies';
import { unwrap } from '@/lib/result';

/** The key of a text such as `Eb major` or `c#`. */
export function key(text: string): Key {
  return unwrap(parseKey(text));
}

/** The numeral of a text, read in the key. */
export function numeral(keyText: string, text: string): Numeral {
  return unwrap(parseNumeral(text, key(keyText).mode));
}

/** Spelled tones from the bass up: `notes('c', 'vii°7')` is `B D F Ab`. */
export function notes(keyText: string, text: string): string {
  return spellNumeral(key(keyText), numeral(keyText, text)).tones.map((tone) => formatPitchClass(tone.fifths)).join(' ');
}

/** Pitch classes of `B D F Ab`, or without spaces `BDFA♭`, in the order written. */
export function tones(text: string): Fifths[] {
  return (text.match(/[A-G](?:#+|b+|♯+|♭+|𝄪|𝄫)?/gu) ?? []).map((name) => unwrap(parsePitchClass(name)));
}

export const anyKey: fc.Arbitrary<Key> = fc.constantFrom(...KEYS);
export const anyMode = fc.constantFrom(...MODES);

export const anySheet: fc.Arbitrary<ConventionSheet> = fc.record({
  cadential: fc.constantFrom(...CADENTIAL_FORMS),
  applied: fc.constantFrom(...APPLIED_FORMS),
  neapolitan: fc.constantFrom(...NEAPOLITAN_FORMS),
  figures: fc.constantFrom(...FIGURE_STYLES),
  case: fc.constantFrom(...CASE_FORMS),
  accidentals: fc.constantFrom(...ACCIDENTAL_FORMS),
  halfDiminished: fc.constantFrom(...HALF_DIMINISHED_FORMS),
  augmentedSixths: fc.constantFrom(...AUGMENTED_SIXTH_FORMS),
});

const anyDegree: fc.Arbitrary<Degree> = fc.record({ step: fc.constantFrom(...STEPS), alter: fc.integer({ min: -2, max: 2 }) });

const anyTarget = fc.record({ degree: anyDegree, mode: anyMode });

const anyAdded = fc.oneof({ weight: 3, arbitrary: fc.constant([]) }, { weight: 1, arbitrary: fc.subarray([...ADDED_TONES], { maxLength: 2 }) });

const anyContext = { applied: fc.array(anyTarget, { maxLength: 3 }), special: fc.constant(null), added: fc.constant([]) };
const plainQuality = fc.constantFrom(...QUALITIES.filter((quality) => !isAugmentedSixth(quality)));

/** Chords that their numeral alone tells, augmented sixths apart. */
const anyPlain = plainQuality.chain((quality) =>
  fc.record({ degree: anyDegree, quality: fc.constant(quality), inversion: anyInversion(quality), ...anyContext, added: anyAdded }),
);
const anyAugmentedSixth = fc.constantFrom(...QUALITIES.filter(isAugmentedSixth)).chain((quality) =>
  fc.record({ degree: fc.constant(degreeOfAugmentedSixth(quality)), quality: fc.constant(quality), inversion: anyInversion(quality), ...anyContext }),
);
const anyNeapolitan = fc.constantFrom<Quality>('major', 'major-seventh').chain((quality) =>
  fc.record({
    ...anyContext,
    degree: fc.constant({ step: 2, alter: -1 } as const),
    quality: fc.constant(quality),
    inversion: anyInversion(quality),
    special: fc.constant('neapolitan' as const),
    added: anyAdded,
  }),
);
const anySixFour = fc.record({
  ...anyContext,
  degree: anyDegree,
  quality: fc.constantFrom<Quality>('major', 'minor', 'diminished', 'augmented'),
  inversion: fc.constant(2 as const),
  special: fc.constantFrom<Special>('passing-six-four', 'pedal-six-four', 'arpeggiated-six-four'),
  added: anyAdded,
});
const anyCadential = fc.record({
  ...anyContext,
  degree: fc.constant({ step: 1, alter: 0 } as const),
  quality: fc.constantFrom<Quality>('major', 'minor'),
  inversion: fc.constant(2 as const),
  special: fc.constant('cadential-six-four' as const),
});
const anyCommonTone = fc.record({
  ...anyContext,
  degree: fc.constant({ step: 2, alter: 1 } as const),
  quality: fc.constant('diminished-seventh' as const),
  inversion: anyInversion('diminished-seventh'),
  special: fc.constant('common-tone' as const),
});
const anyPedal = fc.record({
  ...anyContext,
  degree: anyDegree,
  quality: fc.constant('other' as const),
  inversion: fc.constant(0 as const),
  applied: fc.constant([]),
  special: fc.constant('pedal-tone' as const),
});

function anyInversion(quality: Quality): fc.Arbitrary<Numeral['inversion']> {
  return fc.integer({ min: 0, max: sizeOf(quality) - 1 }).map((inversion) => inversion as Numeral['inversion']);
}

/** Every numeral that the check lets pass; most shapes made here do. */
export const anyNumeral: fc.Arbitrary<Numeral> = fc
  .oneof(
    { weight: 10, arbitrary: anyPlain },
    { weight: 2, arbitrary: anyAugmentedSixth },
    { weight: 1, arbitrary: anyNeapolitan },
    { weight: 2, arbitrary: anySixFour },
    { weight: 1, arbitrary: anyCadential },
    { weight: 1, arbitrary: anyCommonTone },
    { weight: 1, arbitrary: anyPedal },
  )
  .filter((shape: Numeral) => checkNumeral(shape).length === 0);

/** The intervals from each tone up to the next: `intervals('B D F A')` is `m3 m3 M3`. */
export function intervals(spelled: string): string {
  const sounding = tones(spelled);
  return sounding.slice(1).map((tone, i) => formatPitchClassInterval(sounding[i] as Fifths, tone)).join(' ');
}

/** What the key calls these tones, bass first, most usual first: `names('C', 'F# A C Eb')[0]` is `vii°7/V`. */
export function names(keyText: string, spelled: string): string[] {
  const sounding = tones(spelled);
  const here = key(keyText);
  return nameChord(here, { bass: sounding[0] as Fifths, tones: sounding }).map((found) => formatNumeral(found, here.mode));
}

/** Where the tendency tones go, from the bass up: `pulls('C', 'V7')` is `B>C F>E`. */
export function pulls(keyText: string, text: string): string {
  const found = tendenciesOf(key(keyText), numeral(keyText, text)).tones;
  return found.map((tone) => `${formatPitchClass(tone.fifths)}>${tone.expected.map(formatPitchClass).join('|')}`).join(' ');
}

/** The chords that a numeral leads to: `targets('C', 'V7')` is `I vi`. */
export function targets(keyText: string, text: string): string {
  const here = key(keyText);
  return tendenciesOf(here, numeral(keyText, text)).targets.map((target) => formatNumeral(target, here.mode)).join(' ');
}
