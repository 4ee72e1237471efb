import { equalKeys } from '../theory/key';
import { areEnharmonic, rootOf, signFramed, tonicisedKey } from './frame';
import type { Framed } from './key-reading';
import { compareQuality, isAugmentedSixth } from './quality';
import type { Rubric } from './rubric';
import { adoptConvention } from './six-four';
import type { ErrorKind, Part } from './verdict';

/** How far one part of a label is right, 0–1. Only parts that apply to the span are listed. */
export interface PartMark {
  readonly part: Part;
  readonly credit: number;
}

/** One answer against one accepted label. */
export interface Comparison {
  /** The answer says the same as the label, by value and after the rubric's conventions. */
  readonly same: boolean;
  /** The same chord heard in another frame: how the answer hears it; null when the frame is the label's or the chord another. */
  readonly frame: OtherFrame | null;
  readonly credit: number;
  readonly parts: readonly PartMark[];
  readonly errors: readonly ErrorKind[];
}

/** The answer tonicises where the label modulates, or the other way round, or it is simply in another key. */
export type OtherFrame = 'tonicised' | 'modulated' | 'other-key';

export interface Surroundings {
  readonly keysAsked: boolean;
  /** The answer's next label, for what is written in two labels together. */
  readonly nextAnswered: Framed | null;
}

/** Compares an answer with one label of the key, part by part. */
export function compareLabel(keyed: Framed, given: Framed, rubric: Rubric, around: Surroundings): Comparison {
  const answered = adoptConvention(keyed, given, rubric, around.nextAnswered);
  if (signFramed(keyed) === signFramed(answered)) return wholly(keyed, around);
  const findings = [
    compareRoots(keyed, answered, rubric, around),
    compareSounds(keyed, answered, rubric),
    compareTargets(keyed, answered, around),
    compareFunctions(keyed, answered),
    compareKeys(keyed, answered, around),
  ];
  const parts = findings.flatMap((finding) => finding.parts);
  const errors = [...new Set(findings.flatMap((finding) => finding.errors))];
  const isFramed = isTonicisedAgainstModulated(keyed, answered);
  return {
    same: errors.length === 0 && !isFramed,
    frame: soundsRight(parts) ? frameOf(keyed, answered) : null,
    credit: creditOf(parts, errors, rubric) * (isFramed ? rubric.frameCredit : 1),
    parts,
    errors: isFramed ? [...errors, 'frame'] : errors,
  };
}

function soundsRight(parts: readonly PartMark[]): boolean {
  const right = (part: Part) => parts.some((mark) => mark.part === part && mark.credit === 1);
  return right('root') && right('quality') && right('inversion');
}

function frameOf(keyed: Framed, answered: Framed): OtherFrame | null {
  if (equalKeys(keyed.key, answered.key) || rootOf(keyed) !== rootOf(answered)) return null;
  if (!isTonicisedAgainstModulated(keyed, answered) || (isApplied(keyed) && isApplied(answered))) return 'other-key';
  return isApplied(answered) || (!isApplied(keyed) && isTonic(keyed)) ? 'tonicised' : 'modulated';
}

interface Finding {
  readonly parts: readonly PartMark[];
  readonly errors: readonly ErrorKind[];
}

const NOTHING: Finding = { parts: [], errors: [] };

function found(part: Part, credit: number, ...errors: readonly ErrorKind[]): Finding {
  return { parts: [{ part, credit }], errors };
}

function wholly(keyed: Framed, around: Surroundings): Comparison {
  const applies: Part[] = ['root', 'quality', 'inversion'];
  if (isApplied(keyed)) applies.push('applied');
  if (around.keysAsked) applies.push('key');
  return { same: true, frame: null, credit: 1, parts: applies.map((part) => ({ part, credit: 1 })), errors: [] };
}

/** V7 of the tonic itself is no applied chord. */
function isApplied(framed: Framed): boolean {
  return tonicisedKey(framed).tonic !== framed.key.tonic;
}

function compareRoots(keyed: Framed, answered: Framed, rubric: Rubric, around: Surroundings): Finding {
  if (isCommonTone(keyed) !== isCommonTone(answered)) return found('root', 0, 'common-tone');
  if (sharesRoot(keyed, answered)) return found('root', 1);
  if (areEnharmonic(keyed, answered)) return found('root', 0, 'enharmonic');
  if (followsThrough(keyed, answered, rubric, around)) return found('root', 1);
  if (isAccidentalAlone(keyed, answered)) return found('root', rubric.accidentalVoids ? 0 : 0.5, 'accidental');
  if (sixFourOf(keyed) || sixFourOf(answered)) return found('root', 0, 'six-four');
  if (hasWrongTarget(keyed, answered) || isUntargeted(keyed, answered)) return found('root', 0);
  return found('root', 0, 'root');
}

function isCommonTone(framed: Framed): boolean {
  return framed.numeral.special === 'common-tone';
}

function sixFourOf(framed: Framed): boolean {
  return framed.numeral.special === 'cadential-six-four';
}

/** Spelled roots; augmented sixths and common-tone sevenths have none, and go by the key they lean on. */
function sharesRoot(keyed: Framed, answered: Framed): boolean {
  const leaning = isCommonTone(keyed) || (isAugmentedSixth(keyed.numeral.quality) && isAugmentedSixth(answered.numeral.quality));
  return leaning ? tonicisedKey(keyed).tonic === tonicisedKey(answered).tonic : rootOf(keyed) === rootOf(answered);
}

/** The numeral is the key's, only read in the student's own, wrong key. */
function followsThrough(keyed: Framed, answered: Framed, rubric: Rubric, around: Surroundings): boolean {
  if (!rubric.followThrough || !around.keysAsked || equalKeys(keyed.key, answered.key)) return false;
  return sharesRoot(keyed, { ...answered, key: keyed.key });
}

/** The right step with a wrong accidental before it. Raised 6 and 7 in minor are no accidentals of the numeral. */
function isAccidentalAlone(keyed: Framed, answered: Framed): boolean {
  const key = tonicisedKey(keyed);
  if (key.tonic !== tonicisedKey(answered).tonic || keyed.numeral.degree.step !== answered.numeral.degree.step) return false;
  return !(key.mode === 'minor' && keyed.numeral.degree.step >= 6);
}

function hasWrongTarget(keyed: Framed, answered: Framed): boolean {
  if (!isApplied(keyed) || !isApplied(answered)) return false;
  return tonicisedKey(keyed).tonic !== tonicisedKey(answered).tonic && sharesDegree(keyed, answered);
}

/** V7 for V7/V, or V7/V for V7. */
function isUntargeted(keyed: Framed, answered: Framed): boolean {
  return isApplied(keyed) !== isApplied(answered) && sharesDegree(keyed, answered);
}

function sharesDegree(keyed: Framed, answered: Framed): boolean {
  const a = keyed.numeral.degree;
  const b = answered.numeral.degree;
  return a.step === b.step && a.alter === b.alter;
}

function compareSounds(keyed: Framed, answered: Framed, rubric: Rubric): Finding {
  const { triad, seventh, errors } = compareQuality(keyed.numeral.quality, answered.numeral.quality, rubric);
  const added = [...keyed.numeral.added].sort().join() === [...answered.numeral.added].sort().join();
  const inversion = isSameInversion(keyed, answered) ? 1 : 0;
  const inQuality = rubric.seventhIn === 'quality';
  const quality = triad * (inQuality ? seventh : 1) * (added ? 1 : 0.5);
  return {
    parts: [
      { part: 'quality', credit: quality },
      { part: 'inversion', credit: inversion * (inQuality ? 1 : seventh) },
    ],
    errors: [...errors, ...(added ? [] : (['triad-quality'] as const)), ...(inversion ? [] : (['inversion'] as const))],
  };
}

/** Augmented sixths are told by the tone in the bass: the flat sixth is 4/3 for the French, 6 or 6/5 for the others. */
function isSameInversion(keyed: Framed, answered: Framed): boolean {
  const usual = ({ numeral }: Framed) => numeral.inversion - (numeral.quality === 'augmented-sixth-french' ? 1 : 0);
  const both = isAugmentedSixth(keyed.numeral.quality) && isAugmentedSixth(answered.numeral.quality);
  return both ? usual(keyed) === usual(answered) : keyed.numeral.inversion === answered.numeral.inversion;
}

/** Targets are compared by their tonic: the case of the target changes no note of the applied chord. */
function compareTargets(keyed: Framed, answered: Framed, around: Surroundings): Finding {
  if (!isApplied(keyed) && !isApplied(answered)) return NOTHING;
  if (isTonicisedAgainstModulated(keyed, answered)) return NOTHING;
  const inOneKey = around.keysAsked ? { ...answered, key: keyed.key } : answered;
  if (tonicisedKey(keyed).tonic === tonicisedKey(inOneKey).tonic) return found('applied', 1);
  if (!isApplied(answered)) return found('applied', 0, 'applied-missing');
  return found('applied', 0, isApplied(keyed) ? 'applied-target' : 'applied-added');
}

function compareFunctions(keyed: Framed, answered: Framed): Finding {
  const [a, b] = [keyed.numeral.special, answered.numeral.special];
  const concerned = a?.endsWith('six-four') || b?.endsWith('six-four');
  return concerned && a !== b ? found('function', 0, 'six-four') : NOTHING;
}

function compareKeys(keyed: Framed, answered: Framed, around: Surroundings): Finding {
  if (!around.keysAsked) return NOTHING;
  if (equalKeys(keyed.key, answered.key) || isTonicisedAgainstModulated(keyed, answered)) return found('key', 1);
  return found('key', 0, 'key');
}

/**
 * The same tonic is in force for the chord, as a new key for one and as a passing target for the other: V7/V against V7
 * of the dominant's key, and then V against its I.
 */
function isTonicisedAgainstModulated(keyed: Framed, answered: Framed): boolean {
  if (keyed.key.tonic === answered.key.tonic) return false;
  if (isApplied(keyed) || isApplied(answered)) return tonicisedKey(keyed).tonic === tonicisedKey(answered).tonic;
  return rootOf(keyed) === rootOf(answered) && (isTonic(keyed) || isTonic(answered));
}

function isTonic({ numeral }: Framed): boolean {
  return numeral.degree.step === 1 && numeral.degree.alter === 0;
}

/** Shares of the right parts over the shares that apply, under the rubric's rules for what earns together. */
function creditOf(parts: readonly PartMark[], errors: readonly ErrorKind[], rubric: Rubric): number {
  const root = parts.find((mark) => mark.part === 'root')?.credit ?? 0;
  if (rubric.accidentalVoids && errors.includes('accidental')) return 0;
  if (root === 0 && isTargetAlone(errors)) return rubric.targetCredit * creditOfTheRest(parts, rubric);
  if (rubric.rootFirst && root === 0) return 0;
  if (!rubric.wholeNumeral) return share(parts, rubric);
  const numeral: readonly Part[] = ['root', 'quality', 'applied', 'function'];
  const isWhole = parts.every((mark) => !numeral.includes(mark.part) || mark.credit === 1);
  return isWhole ? share(parts, rubric) : 0;
}

/** No error but the target, apart from what is marked by its own part. */
function isTargetAlone(errors: readonly ErrorKind[]): boolean {
  const ofTheRoot: readonly ErrorKind[] = ['root', 'accidental', 'common-tone', 'six-four', 'augmented-sixth', 'enharmonic'];
  return errors.includes('applied-target') && !errors.some((error) => ofTheRoot.includes(error));
}

function creditOfTheRest(parts: readonly PartMark[], rubric: Rubric): number {
  const asIfRight = parts.filter((mark) => mark.part !== 'applied');
  return share(asIfRight.map((mark) => (mark.part === 'root' ? { ...mark, credit: 1 } : mark)), rubric);
}

function share(parts: readonly PartMark[], rubric: Rubric): number {
  const total = parts.reduce((sum, mark) => sum + rubric.shares[mark.part], 0);
  return total === 0 ? 0 : parts.reduce((sum, mark) => sum + rubric.shares[mark.part] * mark.credit, 0) / total;
}
