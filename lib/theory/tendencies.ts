import { keyOfNumeral } from './applied';
import { isAugmentedSixth } from './chord';
import { type Key, degreeOfFifths, fifthsOfDegree } from './key';
import type { Numeral } from './numeral';
import { type Fifths, fifths, formatPitchClassForPeople } from './pitch';
import { isDominant, isLeadingToneChord, targetsOf } from './resolutions';
import { type SpelledTone, spellNumeral } from './spell';

export const TENDENCY_KINDS = ['leading-tone', 'seventh', 'ninth', 'fifth', 'suspended', 'altered'] as const;
export type TendencyKind = (typeof TENDENCY_KINDS)[number];

/** A tone that wants to move. */
export interface Tendency extends SpelledTone {
  readonly kind: TendencyKind;
  /** Leading tone of a chord that is tonicised, not of the local key. */
  readonly temporary: boolean;
  /** Where it goes, the usual first. */
  readonly expected: readonly Fifths[];
  /** Where it may also go without being wrong. */
  readonly allowed: readonly Fifths[];
  /** Why, in a teacher's words. */
  readonly reason: string;
}

export interface Tendencies {
  /** From the bass up. */
  readonly tones: readonly Tendency[];
  /** The chords that the numeral leads to, the usual first; [] where practice names none. */
  readonly targets: readonly Numeral[];
}

/** Everything a rule looks at: the key in which the numeral's degree is read, and the numeral. */
interface Situation {
  readonly frame: Key;
  readonly numeral: Numeral;
  readonly mode: Key['mode'];
}

type Pull = Omit<Tendency, 'fifths' | 'role' | 'temporary'>;

/** Diatonic half steps on the line of fifths: B→C is −5, F→E is +5; a chromatic half step down is −7. */
const HALF_STEP_UP = -5;
const HALF_STEP_DOWN = 5;
const CHROMATIC_DOWN = -7;

/**
 * The tendency tones of a numeral and where each one goes.
 * Sources: Open Music Theory v1 (functional dissonances, applied chords, altered subdominants, cadence types);
 * Integrated Musicianship: Theory, ch. 14b, 16b, 18. What is merely allowed is common practice, no source.
 */
export function tendenciesOf(key: Key, numeral: Numeral): Tendencies {
  const situation: Situation = { frame: keyOfNumeral(key, numeral), numeral, mode: key.mode };
  const tones = spellNumeral(key, numeral).tones.flatMap((tone): Tendency[] => {
    const pull = pullOf(tone, situation);
    return pull ? [{ ...tone, ...pull, temporary: pull.kind === 'leading-tone' && numeral.applied.length > 0 }] : [];
  });
  return { tones, targets: targetsOf(numeral, key.mode) };
}

function pullOf(tone: SpelledTone, situation: Situation): Pull | null {
  const { numeral } = situation;
  if (numeral.special === 'pedal-tone' || numeral.quality === 'other') return null;
  if (numeral.special === 'cadential-six-four') return cadentialPull(tone, situation);
  if (numeral.special === 'common-tone') return commonTonePull(tone, situation);
  if (numeral.special === 'neapolitan') return neapolitanPull(tone, situation);
  if (isAugmentedSixth(numeral.quality)) return augmentedSixthPull(tone, situation);
  return suspendedPull(tone, situation) ?? leadingTonePull(tone, situation) ?? chordPull(tone, situation) ?? alteredPull(tone, situation);
}

function pull(kind: TendencyKind, expected: readonly number[], reason: string, allowed: readonly number[] = []): Pull {
  return { kind, expected: expected.map(fifths), allowed: allowed.map(fifths), reason };
}

function name(f: number): string {
  return formatPitchClassForPeople(fifths(f));
}

/** The key's tone a letter below; the seventh degree of minor is raised where a dominant follows. */
function stepBelow(tone: Fifths, { frame }: Situation, leadingToneFollows: boolean): Fifths {
  const { step } = degreeOfFifths(frame, tone);
  const below = step === 1 ? 7 : ((step - 1) as typeof step);
  const raised = below === 7 && frame.mode === 'minor' && leadingToneFollows ? 1 : 0;
  return fifthsOfDegree(frame, { step: below, alter: raised });
}

function cadentialPull({ fifths: f, role }: SpelledTone, { frame }: Situation): Pull | null {
  const [third, fifth] = [frame.tonic + 5, frame.tonic + 2];
  if (role === 'root') return pull('suspended', [third], `The fourth over the bass, ${name(f)}, falls to the third, ${name(third)}.`);
  return role === 'third' ? pull('suspended', [fifth], `The sixth over the bass, ${name(f)}, falls to the fifth, ${name(fifth)}.`) : null;
}

function commonTonePull({ fifths: f, role }: SpelledTone, { frame }: Situation): Pull | null {
  const third = fifthsOfDegree(frame, { step: 3, alter: 0 });
  const fifth = frame.tonic + 1;
  if (role === 'root') return pull('altered', [third], `${name(f)} goes to ${name(third)}, the third of the chord it embellishes.`);
  if (role === 'third') return pull('altered', [fifth], `${name(f)} rises by half step to ${name(fifth)}.`);
  return role === 'fifth' ? pull('fifth', [fifth], `${name(f)} falls by step to ${name(fifth)}.`) : null;
}

function neapolitanPull({ fifths: f, role }: SpelledTone, situation: Situation): Pull | null {
  const { tonic } = situation.frame;
  const [leading, sol] = [tonic + 5, tonic + 1];
  if (role === 'root') return pull('altered', [leading, tonic], `The lowered second, ${name(f)}, falls to ${name(leading)} in the dominant, or to ${name(tonic)} on the way.`);
  if (role === 'fifth') return pull('altered', [sol], `${name(f)} falls by half step to ${name(sol)}.`);
  return role === 'seventh' ? pull('seventh', [leading], `The seventh, ${name(f)}, falls by step to ${name(leading)}.`, [tonic]) : null;
}

/** Distances from the tonic: the flat sixth −4, the raised fourth 6, the flat third −3, the raised second 9. */
function augmentedSixthPull({ fifths: f }: SpelledTone, { frame: { tonic, mode } }: Situation): Pull | null {
  const [re, mi, sol] = [tonic + 2, tonic + 4, tonic + 1];
  switch (f - tonic) {
    case -4:
      return pull('altered', [sol], `${name(f)} falls by half step to ${name(sol)}: the augmented sixth opens to an octave.`);
    case 6:
      return pull('altered', [sol], `${name(f)} rises by half step to ${name(sol)}: the augmented sixth opens to an octave.`, [f + CHROMATIC_DOWN]);
    case -3:
      return pull('altered', [re], `${name(f)} falls by half step to ${name(re)}; a six-four on the way may hold it.`, mode === 'major' ? [f, mi] : [f]);
    case 9:
      return pull('altered', [mi], `${name(f)} rises by half step to ${name(mi)} in the six-four.`);
    default:
      return null;
  }
}

function suspendedPull({ fifths: f, role }: SpelledTone, { numeral, frame }: Situation): Pull | null {
  const suspended = (role === 'fourth' && numeral.added.includes('sus4')) || (role === 'second' && numeral.added.includes('sus2'));
  if (!suspended) return null;
  const third = spellNumeral(frame, { ...numeral, applied: [], added: [] }).tones.find((tone) => tone.role === 'third')?.fifths;
  return third === undefined ? null : pull('suspended', [third], `${name(f)} stands for the third and goes by step to ${name(third)}.`);
}

/** In minor any chord with the raised seventh has a leading tone; in major V and vii° do. */
function leadingTonePull({ fifths: f, role }: SpelledTone, { frame, numeral, mode }: Situation): Pull | null {
  const hasPull = frame.mode === 'minor' || isDominant(numeral) || isLeadingToneChord(numeral, mode);
  if (f !== frame.tonic + 5 || role === 'seventh' || !hasPull) return null;
  const { tonic } = frame;
  const chromatic = numeral.applied.length > 0 ? [f + CHROMATIC_DOWN] : [];
  const inner = isLeadingToneChord(numeral, mode) ? [] : [tonic + 1];
  const which = numeral.applied.length > 0 ? 'The temporary leading tone' : 'The leading tone';
  return pull('leading-tone', [tonic], `${which}, ${name(f)}, rises by half step to ${name(tonic)}.`, [...inner, ...chromatic]);
}

/** Dissonant members of the chord: seventh, ninth, and the fifth of a leading-tone chord. */
function chordPull(tone: SpelledTone, situation: Situation): Pull | null {
  const { numeral, mode } = situation;
  const below = stepBelow(tone.fifths, situation, numeral.degree.step === 2);
  const [from, to] = [name(tone.fifths), name(below)];
  if (tone.role === 'seventh') return pull('seventh', [below], `The seventh, ${from}, falls by step to ${to}.`, seventhAllowed(situation));
  if (tone.role === 'ninth') return pull('ninth', [below], `The ninth, ${from}, falls by step to ${to}.`);
  if (tone.role === 'fifth' && isLeadingToneChord(numeral, mode)) {
    const free = numeral.quality === 'diminished' ? [situation.frame.tonic + 1] : [];
    return pull('fifth', [below], `${from} makes a diminished fifth with the leading tone and falls by step to ${to}.`, free);
  }
  return null;
}

/** In I–V4/3–I6 the seventh may rise beside the bass. */
function seventhAllowed({ numeral, frame }: Situation): number[] {
  return isDominant(numeral) && numeral.inversion === 2 ? [frame.tonic + 1] : [];
}

/**
 * Chromatic tones lean the way they were altered. Lowered thirds and sevenths (in ♭III, ♭VII, i) are colour without a
 * pull; a Picardy third is at rest; raised 6 and 7 belong to minor. Common practice, no source.
 */
function alteredPull({ fifths: f, role }: SpelledTone, { frame, numeral }: Situation): Pull | null {
  const { step, alter } = degreeOfFifths(frame, f);
  const isPicardy = frame.mode === 'minor' && numeral.degree.step === 1 && role === 'third';
  const belongsToMinor = frame.mode === 'minor' && step >= 6 && alter === 1;
  if (alter === 0 || isPicardy || belongsToMinor) return null;
  if (alter > 0) return pull('altered', [f + HALF_STEP_UP], `${name(f)} is raised and leans up to ${name(f + HALF_STEP_UP)}.`);
  if (step === 3 || step === 7) return null;
  return pull('altered', [f + HALF_STEP_DOWN], `${name(f)} is lowered and leans down to ${name(f + HALF_STEP_DOWN)}.`);
}
