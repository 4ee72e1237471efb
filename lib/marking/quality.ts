import type { Quality } from '../theory/chord';
import type { Rubric } from './rubric';
import type { ErrorKind } from './verdict';

type Triad = 'major' | 'minor' | 'diminished' | 'augmented' | 'augmented-sixth' | 'other';
type Seventh = 'none' | 'major' | 'minor' | 'diminished';

/** Chord qualities as the two things a student hears apart: the triad and what stands above it. */
const ANATOMY: Readonly<Record<Quality, { triad: Triad; seventh: Seventh; ninth?: true }>> = {
  major: { triad: 'major', seventh: 'none' },
  minor: { triad: 'minor', seventh: 'none' },
  diminished: { triad: 'diminished', seventh: 'none' },
  augmented: { triad: 'augmented', seventh: 'none' },
  'dominant-seventh': { triad: 'major', seventh: 'minor' },
  'major-seventh': { triad: 'major', seventh: 'major' },
  'minor-seventh': { triad: 'minor', seventh: 'minor' },
  'half-diminished-seventh': { triad: 'diminished', seventh: 'minor' },
  'diminished-seventh': { triad: 'diminished', seventh: 'diminished' },
  'minor-major-seventh': { triad: 'minor', seventh: 'major' },
  'augmented-major-seventh': { triad: 'augmented', seventh: 'major' },
  'augmented-seventh': { triad: 'augmented', seventh: 'minor' },
  'dominant-ninth': { triad: 'major', seventh: 'minor', ninth: true },
  'dominant-minor-ninth': { triad: 'major', seventh: 'minor', ninth: true },
  'augmented-sixth-italian': { triad: 'augmented-sixth', seventh: 'none' },
  'augmented-sixth-french': { triad: 'augmented-sixth', seventh: 'none' },
  'augmented-sixth-german': { triad: 'augmented-sixth', seventh: 'none' },
  'augmented-sixth-swiss': { triad: 'augmented-sixth', seventh: 'none' },
  other: { triad: 'other', seventh: 'none' },
};

/** The triad that a chord is or is built on; null for augmented sixths and chords without one. */
export function triadOf(quality: Quality): 'major' | 'minor' | 'diminished' | 'augmented' | null {
  const { triad } = ANATOMY[quality];
  return triad === 'other' || triad === 'augmented-sixth' ? null : triad;
}

export function isAugmentedSixth(quality: Quality): boolean {
  return ANATOMY[quality].triad === 'augmented-sixth';
}

/** How far two qualities agree: the triad and the seventh, each as a credit 0–1, and what is wrong. */
export interface QualityComparison {
  readonly triad: number;
  readonly seventh: number;
  readonly errors: readonly ErrorKind[];
}

const SAME: QualityComparison = { triad: 1, seventh: 1, errors: [] };

export function compareQuality(keyed: Quality, answered: Quality, rubric: Rubric): QualityComparison {
  if (keyed === answered) return SAME;
  if (isAugmentedSixth(keyed) || isAugmentedSixth(answered)) return { triad: 0, seventh: 1, errors: ['augmented-sixth'] };
  const triad = compareTriads(ANATOMY[keyed].triad, ANATOMY[answered].triad, rubric);
  const wrongSeventh = compareSevenths(keyed, answered, rubric);
  const errors: ErrorKind[] = [...(triad ? [] : (['triad-quality'] as const)), ...(wrongSeventh ? [wrongSeventh] : [])];
  return { triad: triad ? 1 : 0, seventh: wrongSeventh ? rubric.seventhCredit : 1, errors };
}

/** Upper and lower case write major and minor only; the signs ° ø + are no matter of case. */
function compareTriads(keyed: Triad, answered: Triad, rubric: Rubric): boolean {
  if (keyed === 'other' || answered === 'other') return false;
  const plain = (triad: Triad) => triad === 'major' || triad === 'minor';
  return keyed === answered || (rubric.caseIgnored && plain(keyed) && plain(answered));
}

function compareSevenths(keyed: Quality, answered: Quality, rubric: Rubric): ErrorKind | null {
  const key = ANATOMY[keyed];
  const answer = ANATOMY[answered];
  // Ninths are the seventh chords they extend: reports and most courses count them so.
  if (key.seventh === answer.seventh) return null;
  if (answer.seventh === 'none') return 'seventh-missing';
  if (key.seventh === 'none') return 'seventh-added';
  if (key.triad === 'diminished' && answer.triad === 'diminished') return 'leading-tone-seventh';
  // With another triad the plain "7" means another seventh: one mistake, named once.
  return key.triad === answer.triad && !rubric.caseIgnored ? 'seventh-quality' : null;
}
