import { type Key, fifthsOfDegree } from '../theory/key';
import type { Fifths } from '../theory/pitch';
import type { Numeral } from '../theory/numeral';
import type { Framed } from './key-reading';

/** The key a chord is heard in for its moment: that of the applied chord's target, or else the local key. */
export function tonicisedKey(framed: Framed): Key {
  return [...framed.numeral.applied]
    .reverse()
    .reduce((key: Key, target) => ({ tonic: fifthsOfDegree(key, target.degree), mode: target.mode }), framed.key);
}

/** The spelled root. For augmented sixths and CT°7 it is a convention, not a sounding root: compare those by type. */
export function rootOf(framed: Framed): Fifths {
  return fifthsOfDegree(tonicisedKey(framed), framed.numeral.degree);
}

/** One string per numeral value: equal strings, equal numerals. Not for people. */
export function signNumeral(numeral: Numeral): string {
  const { degree, quality, inversion, applied, special, added } = numeral;
  const targets = applied.map((t) => `${t.degree.step},${t.degree.alter},${t.mode}`).join(';');
  return [degree.step, degree.alter, quality, inversion, targets, special ?? '', [...added].sort().join(',')].join('|');
}

/** The same for a numeral in its key. */
export function signFramed(framed: Framed): string {
  return `${framed.key.tonic} ${framed.key.mode}:${signNumeral(framed.numeral)}`;
}
