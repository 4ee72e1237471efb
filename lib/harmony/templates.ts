import { type Quality, type Role } from '../theory/chord';

/**
 * A kind of chord as the engine looks for it: the distances of its tones from the root on the line of fifths (major third
 * +4, minor third −3, perfect fifth +1, minor seventh −2, diminished seventh −9 …), root first, so that tone i is the bass
 * of inversion i. Augmented sixths count from the root that numerals give them: the raised fourth degree for Italian and
 * German (third −10, fifth −6, seventh −9), the second degree for French (+4, −6, −2).
 */
export interface Template {
  readonly quality: Quality;
  readonly tones: readonly number[];
  readonly roles: readonly Role[];
  readonly isSeventh: boolean;
  readonly isAugmentedSixth: boolean;
}

function triad(quality: Quality, third: number, fifth: number): Template {
  return { quality, tones: [0, third, fifth], roles: ['root', 'third', 'fifth'], isSeventh: false, isAugmentedSixth: false };
}

function seventh(quality: Quality, third: number, fifth: number, top: number): Template {
  const roles: readonly Role[] = ['root', 'third', 'fifth', 'seventh'];
  return { quality, tones: [0, third, fifth, top], roles, isSeventh: true, isAugmentedSixth: false };
}

function augmentedSixth(template: Template): Template {
  return { ...template, isSeventh: false, isAugmentedSixth: true };
}

/** Every kind that the search looks for. The index in this list is the engine's number for the kind. */
export const TEMPLATES: readonly Template[] = [
  triad('major', 4, 1),
  triad('minor', -3, 1),
  triad('diminished', -3, -6),
  triad('augmented', 4, 8),
  seventh('dominant-seventh', 4, 1, -2),
  seventh('major-seventh', 4, 1, 5),
  seventh('minor-seventh', -3, 1, -2),
  seventh('half-diminished-seventh', -3, -6, -2),
  seventh('diminished-seventh', -3, -6, -9),
  seventh('minor-major-seventh', -3, 1, 5),
  seventh('augmented-major-seventh', 4, 8, 5),
  augmentedSixth(triad('augmented-sixth-italian', -10, -6)),
  augmentedSixth(seventh('augmented-sixth-french', 4, -6, -2)),
  augmentedSixth(seventh('augmented-sixth-german', -10, -6, -9)),
  seventh('augmented-seventh', 4, 8, -2),
];

export const KIND_COUNT = TEMPLATES.length;

/** The engine's number of a quality; ninths are found as the seventh chord they extend. −1 for what is not looked for. */
export function findKind(quality: Quality): number {
  const plain = quality === 'dominant-ninth' || quality === 'dominant-minor-ninth' ? 'dominant-seventh' : quality;
  const known = plain === 'augmented-sixth-swiss' ? 'augmented-sixth-german' : plain;
  return TEMPLATES.findIndex((template) => template.quality === known);
}

export const MAJOR = 0;
export const MINOR = 1;
export const DIMINISHED = 2;
export const AUGMENTED = 3;
export const DOMINANT_SEVENTH = 4;
export const MAJOR_SEVENTH = 5;
export const MINOR_SEVENTH = 6;
export const HALF_DIMINISHED = 7;
export const DIMINISHED_SEVENTH = 8;
export const MINOR_MAJOR_SEVENTH = 9;
export const AUGMENTED_MAJOR_SEVENTH = 10;
export const ITALIAN = 11;
export const FRENCH = 12;
export const GERMAN = 13;
export const AUGMENTED_SEVENTH = 14;
