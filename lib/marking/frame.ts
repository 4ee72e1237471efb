import { keyOfNumeral } from '../theory/applied';
import { type Key, fifthsOfDegree } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { type Fifths, pitchClassOf } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';
import type { Framed } from './key-reading';

/** The key a chord is heard in for its moment: that of the applied chord's target, or else the local key. */
export function tonicisedKey(framed: Framed): Key {
  return keyOfNumeral(framed.key, framed.numeral);
}

/** The spelled root. For augmented sixths and CT°7 it is a convention, not a sounding root: compare those by type. */
export function rootOf(framed: Framed): Fifths {
  return fifthsOfDegree(tonicisedKey(framed), framed.numeral.degree);
}

/** The written notes of a chord, in the order of the line of fifths. */
export function tonesOf(framed: Framed): Fifths[] {
  return spellNumeral(framed.key, framed.numeral).tones.map((tone) => tone.fifths).sort((a, b) => a - b);
}

export function bassOf(framed: Framed): Fifths {
  return spellNumeral(framed.key, framed.numeral).bass;
}

/** The two sound alike and are written with other notes. */
export function areEnharmonic(a: Framed, b: Framed): boolean {
  const sound = (tones: readonly Fifths[]) => tones.map(pitchClassOf).sort((x, y) => x - y).join();
  const [ours, theirs] = [tonesOf(a), tonesOf(b)];
  return ours.join() !== theirs.join() && sound(ours) === sound(theirs);
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
