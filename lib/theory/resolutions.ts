import { isAugmentedSixth, sizeOf, triadOf } from './chord';
import type { Mode } from './key';
import { type Numeral, type Target, isNeapolitan } from './numeral';

/**
 * Which chord a chord leads to, as the textbooks give it, most usual first.
 * Sources: Open Music Theory v1 (applied chords, altered subdominants, cadence types); Integrated Musicianship: Theory,
 * ch. 14b, 16b, 18, 20a (leading-tone sevenths and their inversions, Neapolitan, common-tone chords).
 */

type Inversion = Numeral['inversion'];

/** The mode of the key in which the numeral's own degree is read. */
function frameMode(numeral: Numeral, mode: Mode): Mode {
  return numeral.applied[0]?.mode ?? mode;
}

function chord(step: Numeral['degree']['step'], quality: Numeral['quality'], inversion: Inversion, applied: readonly Target[]): Numeral {
  return { degree: { step, alter: 0 }, quality, inversion, applied, special: null, added: [] };
}

/** The tonic of the frame: of an applied chord, the chord it points at. */
function tonicOf(numeral: Numeral, mode: Mode, inversion: Inversion = 0): Numeral {
  const [target, ...rest] = numeral.applied;
  if (!target) return chord(1, mode, inversion, []);
  const { degree, mode: quality } = target;
  const special = isNeapolitan({ degree, quality }) ? 'neapolitan' : null;
  return { degree, quality, inversion, applied: rest, special, added: [] };
}

function cadentialOf(numeral: Numeral, mode: Mode): Numeral {
  return { ...chord(1, frameMode(numeral, mode), 2, numeral.applied), special: 'cadential-six-four' };
}

function dominantsOf(numeral: Numeral): Numeral[] {
  return [chord(5, 'major', 0, numeral.applied), chord(5, 'dominant-seventh', 0, numeral.applied)];
}

/** A dominant: V with a major third, in root position or not, triad, seventh or ninth. */
export function isDominant({ degree, quality }: Numeral): boolean {
  const triad = triadOf(quality);
  return degree.step === 5 && degree.alter === 0 && (triad === 'major' || triad === 'augmented');
}

/** vii° and its sevenths, on the leading tone. */
export function isLeadingToneChord(numeral: Numeral, mode: Mode): boolean {
  const { degree, quality } = numeral;
  const leading = frameMode(numeral, mode) === 'major' ? 0 : 1;
  return degree.step === 7 && degree.alter === leading && triadOf(quality) === 'diminished';
}

/** ii and IV of any quality: what goes before the dominant. */
export function isPredominant({ degree, quality }: Numeral): boolean {
  return (degree.step === 2 || degree.step === 4) && degree.alter === 0 && triadOf(quality) !== null;
}

/** The chords that the numeral leads to; [] where practice names none. `mode` is that of the local key. */
export function targetsOf(numeral: Numeral, mode: Mode): Numeral[] {
  if (numeral.special === 'cadential-six-four') return dominantsOf(numeral);
  if (numeral.special === 'common-tone') return [tonicOf(numeral, mode)];
  if (numeral.special === 'neapolitan') return neapolitanTargets(numeral, mode);
  if (isAugmentedSixth(numeral.quality)) return augmentedSixthTargets(numeral, mode);
  if (isDominant(numeral)) return dominantTargets(numeral, mode);
  if (isLeadingToneChord(numeral, mode)) return leadingToneTargets(numeral, mode);
  return isPredominant(numeral) ? [...dominantsOf(numeral), cadentialOf(numeral, mode)] : [];
}

function neapolitanTargets(numeral: Numeral, mode: Mode): Numeral[] {
  const toDominant: Target = { degree: { step: 5, alter: 0 }, mode: 'major' };
  const secondary = chord(7, 'diminished-seventh', 0, [toDominant, ...numeral.applied]);
  return [...dominantsOf(numeral), cadentialOf(numeral, mode), secondary];
}

/** The German and the Swiss go through the six-four, which keeps them from parallel fifths. */
function augmentedSixthTargets(numeral: Numeral, mode: Mode): Numeral[] {
  const throughSixFour = sizeOf(numeral.quality) === 4 && numeral.quality !== 'augmented-sixth-french';
  const sixFour = cadentialOf(numeral, mode);
  return throughSixFour ? [sixFour, ...dominantsOf(numeral)] : [...dominantsOf(numeral), sixFour];
}

/** An applied chord of V may also go to V with its seventh, or first to the six-four over it. */
function onwardFrom(numeral: Numeral, mode: Mode): Numeral[] {
  const [target, ...rest] = numeral.applied;
  if (target?.degree.step !== 5 || target.degree.alter !== 0 || target.mode !== 'major') return [];
  const outer = { ...numeral, applied: rest };
  return [chord(5, 'dominant-seventh', 0, rest), cadentialOf(outer, mode)];
}

/** By inversion of the dominant seventh: 4/2 leads to the tonic's first inversion, 4/3 to either. */
const AFTER_DOMINANT: readonly (readonly Inversion[])[] = [[0], [0], [0, 1], [1], [0]];

function dominantTargets(numeral: Numeral, mode: Mode): Numeral[] {
  const tonics = (AFTER_DOMINANT[numeral.inversion] ?? [0]).map((inversion) => tonicOf(numeral, mode, inversion));
  const deceptive = numeral.inversion === 0 ? [submediantOf(numeral, mode)] : [];
  return [...tonics, ...onwardFrom(numeral, mode), ...deceptive];
}

/** Where a deceptive cadence goes: vi, in minor VI. */
function submediantOf(numeral: Numeral, mode: Mode): Numeral {
  return chord(6, frameMode(numeral, mode) === 'major' ? 'minor' : 'major', 0, numeral.applied);
}

function leadingToneTargets(numeral: Numeral, mode: Mode): Numeral[] {
  const onward = onwardFrom(numeral, mode);
  if (sizeOf(numeral.quality) === 3) return [tonicOf(numeral, mode, 0), tonicOf(numeral, mode, 1), ...onward];
  if (numeral.inversion === 3) return [tonicOf(numeral, mode, 2), ...dominantsOf(numeral), ...onward];
  return [tonicOf(numeral, mode, numeral.inversion === 0 ? 0 : 1), ...onward, ...dominantsOf(numeral)];
}
