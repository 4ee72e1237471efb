import { plainTriad } from './diatonic';
import { type Degree, type Key, type Mode, degreeOfFifths, fifthsOfDegree } from './key';
import type { Numeral, Target } from './numeral';
import { fifths, formatPitchClassForPeople } from './pitch';

/** The key that a target makes its own for the moment, seen from the key it is read in. */
export function keyOfTarget(key: Key, target: Target): Key {
  return { tonic: fifthsOfDegree(key, target.degree), mode: target.mode };
}

/** The key in which the numeral's own degree is read: the nearest target's, or the local key where there is none. */
export function keyOfNumeral(key: Key, numeral: Pick<Numeral, 'applied'>): Key {
  return numeral.applied.reduceRight(keyOfTarget, key);
}

/**
 * A chain of targets as one target in the local key, as the report contract wants it: V7/V/ii in C major points at A
 * major, {step 6, alter 0, major}. A target that is the tonic in the key's own mode is null.
 */
export function reduceApplied(numeral: Numeral, mode: Mode): { degree: Degree; applied: Target | null } {
  const local: Key = { tonic: fifths(0), mode };
  const tonicised = keyOfNumeral(local, numeral);
  const degree = degreeOfFifths(local, tonicised.tonic);
  const isTonic = degree.step === 1 && degree.alter === 0 && tonicised.mode === mode;
  return { degree: numeral.degree, applied: isTonic ? null : { degree, mode: tonicised.mode } };
}

/** Something that a numeral says and practice does not bear out. */
export interface AppliedFinding {
  readonly code: 'half-diminished-of-minor' | 'target-diminished-in-key';
  readonly sentence: string;
}

/**
 * The rules of the applied leading-tone seventh: before a major target both the half- and the fully diminished seventh
 * occur, before a minor one the fully diminished alone; and a triad that is diminished in its key is no target.
 * [] when nothing is against the numeral. Source: Integrated Musicianship: Theory, ch. 14b–c.
 */
export function checkAppliedQuality(key: Key, numeral: Numeral): AppliedFinding[] {
  const [target, outer] = numeral.applied;
  if (!target) return [];
  const tonic = formatPitchClassForPeople(keyOfNumeral(key, numeral).tonic);
  const findings: AppliedFinding[] = [];
  if (isHalfDiminishedOnLeadingTone(numeral, target.mode) && target.mode === 'minor') {
    const sentence = `${tonic} minor is tonicised by a fully diminished seventh; the half-diminished one goes to a major chord.`;
    findings.push({ code: 'half-diminished-of-minor', sentence });
  }
  if (plainTriad(outer?.mode ?? key.mode, target.degree) === 'diminished') {
    const sentence = `The key’s own triad on ${tonic} is diminished, and a diminished triad cannot be tonicised.`;
    findings.push({ code: 'target-diminished-in-key', sentence });
  }
  return findings;
}

function isHalfDiminishedOnLeadingTone({ degree, quality }: Numeral, mode: Mode): boolean {
  return quality === 'half-diminished-seventh' && degree.step === 7 && degree.alter === (mode === 'minor' ? 1 : 0);
}
