import { type Quality, isAugmentedSixth, sizeOf } from './chord';
import type { Degree, Mode, Step } from './key';

/** What an applied chord points at: a degree of the key it is read in, tonicised in `mode`. */
export interface Target {
  readonly degree: Degree;
  readonly mode: Mode;
}

/** Chords whose numeral alone does not say what they are. */
export const SPECIALS = [
  'cadential-six-four',
  'passing-six-four',
  'pedal-six-four',
  'arpeggiated-six-four',
  'neapolitan',
  'common-tone',
  'pedal-tone',
] as const;
export type Special = (typeof SPECIALS)[number];

export const ADDED_TONES = ['sus2', 'sus4', 'add4', 'add6', 'add9'] as const;
export type AddedTone = (typeof ADDED_TONES)[number];

/**
 * A Roman numeral as a value.
 * `degree` is the root's degree, read in the key of `applied[0]` when there is one, or else in the local key.
 * `applied` is the chain of targets, nearest first: V7/V/ii in C is [{step 5, major}, {step 2, minor}]: the 5th of the
 * key of ii, tonicised. Each target's degree is read in the key of the next one; the last in the local key.
 * The cadential six-four is the tonic triad (degree 1, inversion 2) with its special, however a convention prints it.
 * Augmented sixths: degree {4, +1} for Italian and German (root the raised fourth), {2, 0} for French; the usual
 * position, flat sixth in the bass, is inversion 1, 1 and 2.
 * The major triad on the lowered second (and its major seventh) is always `neapolitan`. The common-tone °7 is spelled
 * on the raised second of the key it embellishes, degree {2, +1}. `pedal-tone` is the held tone alone, quality `other`.
 * `added`: tones over the plain chord, in the order of ADDED_TONES, each diatonic in the key of `applied[0]` or the
 * local key; `sus` tones stand for the third. The ninth of a dominant is part of the quality.
 */
export interface Numeral {
  readonly degree: Degree;
  readonly quality: Quality;
  readonly inversion: 0 | 1 | 2 | 3 | 4;
  readonly applied: readonly Target[];
  readonly special: Special | null;
  readonly added: readonly AddedTone[];
}

/** The major triad on the lowered second, or its major seventh chord. */
export function isNeapolitan({ degree, quality }: Pick<Numeral, 'degree' | 'quality'>): boolean {
  return isOn(degree, 2, -1) && (quality === 'major' || quality === 'major-seventh');
}

function isOn(degree: Degree, step: Step, alter: number): boolean {
  return degree.step === step && degree.alter === alter;
}

/** The root's degree by which each augmented sixth is written: see Numeral. */
export function degreeOfAugmentedSixth(quality: Quality): Degree {
  if (quality === 'augmented-sixth-french') return { step: 2, alter: 0 };
  return quality === 'augmented-sixth-swiss' ? { step: 2, alter: 1 } : { step: 4, alter: 1 };
}

/** No chord of common practice stands on a degree altered by more than two half steps. */
export const FARTHEST_ALTER = 2;

/** Why these added tones cannot stand together over this chord; null when they can. */
export function findAddedConflict({ quality, inversion, added }: Pick<Numeral, 'quality' | 'inversion' | 'added'>): string | null {
  const has = (tone: AddedTone) => added.includes(tone);
  if ((has('sus2') || has('sus4')) && inversion === 1) return 'the third is in the bass here, so no tone can stand for it.';
  if (has('sus4') && has('add4')) return 'the fourth cannot stand for the third and beside it.';
  if ((has('sus2') || sizeOf(quality) === 5) && has('add9')) return 'the ninth is in the chord already.';
  return has('sus2') && sizeOf(quality) === 5 ? 'the ninth is in the chord already.' : null;
}

/**
 * What is wrong with a numeral as a value, in sentences; [] for every numeral that `parseNumeral` gives. A numeral
 * without findings can be spelled in every key and comes back from its own text.
 */
export function checkNumeral(numeral: Numeral): string[] {
  const { degree, quality, inversion, applied, added } = numeral;
  const degrees = [degree, ...applied.map((target) => target.degree)];
  const isNear = ({ alter }: Degree) => Number.isInteger(alter) && Math.abs(alter) <= FARTHEST_ALTER;
  const conflict = findAddedConflict(numeral);
  return [
    ...unless(inversion < sizeOf(quality), `A ${quality} chord has no inversion ${inversion}.`),
    ...unless(degrees.every(isNear), 'A degree is altered by more than two half steps.'),
    ...unless(conflict === null, `Added tones: ${conflict ?? ''}`),
    ...unless(isInOrder(added), 'Added tones are out of order or doubled.'),
    ...specialFindings(numeral),
  ];
}

function unless(isRight: boolean, finding: string): string[] {
  return isRight ? [] : [finding];
}

function isInOrder(added: readonly AddedTone[]): boolean {
  const places = added.map((tone) => ADDED_TONES.indexOf(tone));
  return places.every((place, i) => i === 0 || place > (places[i - 1] as number));
}

function specialFindings(numeral: Numeral): string[] {
  const { degree, quality, inversion, applied, special, added } = numeral;
  const isSixth = isAugmentedSixth(quality);
  const own = degreeOfAugmentedSixth(quality);
  const isBare = quality === 'other' || isSixth || special === 'common-tone' || special === 'cadential-six-four';
  const misfit = `${special ?? 'No special'} does not fit a ${quality} chord on degree ${degree.step}, inversion ${inversion}.`;
  return [
    ...unless(!isBare || added.length === 0, 'This chord takes no added tones.'),
    ...unless(!isSixth || isOn(degree, own.step, own.alter), `The ${quality} stands on its own degree only.`),
    ...unless(fitsSpecial(numeral), misfit),
    ...unless(special !== 'pedal-tone' || applied.length === 0, 'A pedal takes no target.'),
  ];
}

function fitsSpecial({ degree, quality, inversion, special }: Numeral): boolean {
  const isSixFour = sizeOf(quality) === 3 && inversion === 2 && !isAugmentedSixth(quality);
  switch (special) {
    case null:
      return !isNeapolitan({ degree, quality });
    case 'neapolitan':
      return isNeapolitan({ degree, quality });
    case 'cadential-six-four':
      return isOn(degree, 1, 0) && isSixFour && (quality === 'major' || quality === 'minor');
    case 'common-tone':
      return isOn(degree, 2, 1) && quality === 'diminished-seventh';
    case 'pedal-tone':
      return quality === 'other';
    default:
      return isSixFour;
  }
}

export type { Mode };
