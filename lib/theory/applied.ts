import { type Degree, type Key, type Mode, degreeOfFifths, fifthsOfDegree } from './key';
import type { Numeral, Target } from './numeral';
import { fifths } from './pitch';

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
