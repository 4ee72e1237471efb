import { checkAppliedQuality, keyOfNumeral, keyOfTarget } from './applied';
import { QUALITIES, type Quality, TEMPLATES, isAugmentedSixth, triadOf } from './chord';
import { type Key, type Mode, type Step, degreeOfFifths } from './key';
import { type Numeral, type Target, degreeOfAugmentedSixth, isNeapolitan } from './numeral';
import type { Fifths } from './pitch';
import { isDominant, isLeadingToneChord, isPredominant } from './resolutions';
import { spellNumeral } from './spell';

/** Spelled pitch classes, in any order and number; the bass is one of them. */
export interface ChordNotes {
  readonly bass: Fifths;
  readonly tones: readonly Fifths[];
}

/**
 * Every numeral of the key that spells exactly these pitch classes over this bass, most usual first: the key's own
 * chords, borrowed ones, those applied to each major and minor triad of the key and of its parallel, augmented sixths,
 * the Neapolitan, the common-tone chord; and the root with its accidental where nothing better fits. A second-inversion
 * tonic is cadential first. [] when the tones make no chord of QUALITIES.
 */
export function nameChord(key: Key, notes: ChordNotes): Numeral[] {
  const frames: readonly (readonly Target[])[] = [[], ...TARGETS[key.mode].map((target) => [target])];
  const named = findChords(notes).flatMap((chord) => frames.flatMap((applied) => numeralsIn(key, chord, applied)));
  const ranked = named.map((numeral) => ({ numeral, rank: rankOf(key, numeral) }));
  return ranked.toSorted((a, b) => a.rank - b.rank).map(({ numeral }) => numeral);
}

interface FoundChord {
  readonly root: Fifths;
  readonly quality: Quality;
  readonly inversion: Numeral['inversion'];
}

/** Roots and qualities whose template is exactly the set of tones. */
function findChords({ bass, tones }: ChordNotes): FoundChord[] {
  const sounding = new Set([bass, ...tones]);
  return [...sounding].flatMap((root) =>
    QUALITIES.filter((quality) => quality !== 'other' && spellsExactly(TEMPLATES[quality], root, sounding)).map((quality) => ({
      root,
      quality,
      inversion: TEMPLATES[quality].indexOf(bass - root) as Numeral['inversion'],
    })),
  );
}

function spellsExactly(template: readonly number[], root: Fifths, sounding: ReadonlySet<number>): boolean {
  return template.length === sounding.size && template.every((distance) => sounding.has(root + distance));
}

const target = (step: Step, alter: number, mode: Mode): Target => ({ degree: { step, alter }, mode });

/** Major and minor triads of the key and of its parallel, most usual first; those of the parallel from `v` or `♭II` on. */
const TARGETS: Readonly<Record<Mode, readonly Target[]>> = {
  major: [
    target(5, 0, 'major'),
    target(2, 0, 'minor'),
    target(6, 0, 'minor'),
    target(4, 0, 'major'),
    target(3, 0, 'minor'),
    target(5, 0, 'minor'),
    target(4, 0, 'minor'),
    target(6, -1, 'major'),
    target(3, -1, 'major'),
    target(7, -1, 'major'),
    target(2, -1, 'major'),
  ],
  minor: [
    target(5, 0, 'major'),
    target(4, 0, 'minor'),
    target(3, 0, 'major'),
    target(6, 0, 'major'),
    target(7, 0, 'major'),
    target(5, 0, 'minor'),
    target(2, -1, 'major'),
    target(4, 0, 'major'),
  ],
};

/** How many of TARGETS are the key's own triads. */
const OWN_TARGETS: Readonly<Record<Mode, number>> = { major: 5, minor: 6 };

/** What a found chord is called in a frame: nothing, one numeral, or two where one shape has two functions. */
function numeralsIn(key: Key, { root, quality, inversion }: FoundChord, applied: readonly Target[]): Numeral[] {
  const frame = applied.reduceRight(keyOfTarget, key);
  const plain: Numeral = { degree: degreeOfFifths(frame, root), quality, inversion, applied, special: null, added: [] };
  const numerals = specialsOf(plain, frame.mode);
  return applied.length === 0 ? numerals : numerals.filter((numeral) => isAppliedUse(key, numeral));
}

function specialsOf(plain: Numeral, mode: Mode): Numeral[] {
  const { degree, quality, inversion } = plain;
  if (isAugmentedSixth(quality)) return isOnItsDegree(plain) ? [plain] : [];
  if (isNeapolitan(plain)) return [{ ...plain, special: 'neapolitan' }];
  const isTonicSixFour = degree.step === 1 && degree.alter === 0 && quality === mode && inversion === 2;
  if (isTonicSixFour) return [{ ...plain, special: 'cadential-six-four' }, plain];
  const isCommonTone = quality === 'diminished-seventh' && degree.step === 2 && degree.alter === 1;
  return isCommonTone ? [{ ...plain, special: 'common-tone' }, plain] : [plain];
}

function isOnItsDegree({ degree, quality }: Numeral): boolean {
  const usual = degreeOfAugmentedSixth(quality);
  return degree.step === usual.step && degree.alter === usual.alter;
}

/** Chords that tonicise: dominants and leading-tone chords of the right quality; then what prepares those in the target's key. */
function isAppliedUse(key: Key, numeral: Numeral): boolean {
  if (isDominant(numeral) || isLeadingToneChord(numeral, key.mode)) return checkAppliedQuality(key, numeral).length === 0;
  if (numeral.special === 'common-tone' || numeral.special === 'neapolitan' || isAugmentedSixth(numeral.quality)) return true;
  return isPredominant(numeral) && isOwnChord(key, numeral);
}

/** All tones belong to the scale of the numeral's own key, with minor's raised sixth and seventh. */
function isOwnChord(key: Key, numeral: Numeral): boolean {
  const frame = keyOfNumeral(key, numeral);
  return spellNumeral(key, numeral).tones.every(({ fifths: f }) => isScaleTone(frame, f));
}

function isScaleTone(frame: Key, f: Fifths): boolean {
  const { step, alter } = degreeOfFifths(frame, f);
  return alter === 0 || (frame.mode === 'minor' && step >= 6 && alter === 1);
}

/** All tones belong to the key or to its parallel. */
function isBorrowed(key: Key, numeral: Numeral): boolean {
  const parallel: Key = { tonic: key.tonic, mode: key.mode === 'major' ? 'minor' : 'major' };
  return spellNumeral(key, numeral).tones.every(({ fifths: f }) => isScaleTone(key, f) || isScaleTone(parallel, f));
}

/**
 * How unusual a numeral is: the key's own chords, then dominants applied to its own triads, borrowed chords and
 * predominant chromaticism, then the rest. The order follows the frequencies of references.md section 14 (label priors).
 */
function rankOf(key: Key, numeral: Numeral): number {
  return (numeral.applied.length === 0 ? localRank(key, numeral) : appliedRank(key, numeral)) + degreeRank(numeral) / 100;
}

function localRank(key: Key, numeral: Numeral): number {
  if (numeral.special === 'common-tone') return 5;
  if (numeral.special === 'neapolitan' || isAugmentedSixth(numeral.quality)) return 2;
  if (isOwnChord(key, numeral)) return isSubtonicSeventh(key, numeral) ? 2 : numeral.quality === 'augmented' ? 1 : 0;
  return isBorrowed(key, numeral) && triadOf(numeral.quality) !== 'augmented' ? 3 : 7;
}

/** VII7 in minor is heard as V7 of III sooner than as a chord of its own. */
function isSubtonicSeventh({ mode }: Key, { degree, quality }: Numeral): boolean {
  return mode === 'minor' && degree.step === 7 && degree.alter === 0 && quality === 'dominant-seventh';
}

function appliedRank(key: Key, numeral: Numeral): number {
  const place = TARGETS[key.mode].findIndex(({ degree, mode }) => {
    const nearest = numeral.applied[0];
    return nearest?.degree.step === degree.step && nearest.degree.alter === degree.alter && nearest.mode === mode;
  });
  const isOwnTarget = place < OWN_TARGETS[key.mode];
  const isDominantUse = isDominant(numeral) || isLeadingToneChord(numeral, key.mode);
  if (isDominantUse) return (isOwnTarget ? 1 : 4) + place / 20;
  return (isOwnTarget ? 6 : 8) + place / 20;
}

/** Between equals: sevenths before triads where a chord is applied is settled by the tones; here only the step decides. */
function degreeRank({ degree, special }: Numeral): number {
  const usual: readonly Step[] = [1, 5, 4, 2, 6, 7, 3];
  return usual.indexOf(degree.step) + (special === 'cadential-six-four' ? -0.5 : 0);
}

