import type { Numeral } from '../theory/numeral';
import type { Framed } from './key-reading';
import type { Rubric } from './rubric';
import { signNumeral } from './frame';

/**
 * The answer in the key's way of writing, where the rubric takes its own way as the same thing: a cadential six-four
 * written as the tonic's or the dominant's, six-fours without their kind, N6 for ♭II6. Anything else comes back as it is.
 */
export function adoptConvention(keyed: Framed, answered: Framed, rubric: Rubric, next: Framed | null): Framed {
  const numeral = adoptSpecial(keyed.numeral, answered.numeral);
  if (keyed.numeral.special !== 'cadential-six-four') return { ...answered, numeral };
  if (!isAccepted(keyed, { ...answered, numeral }, rubric, next)) return { ...answered, numeral };
  return { ...answered, numeral: { ...keyed.numeral, applied: numeral.applied } };
}

/** Leaves out what the answer need not say: the Neapolitan's name, a six-four's kind (the cadential one has its rules). */
function adoptSpecial(keyed: Numeral, answered: Numeral): Numeral {
  if (keyed.special === answered.special) return answered;
  if (keyed.special === 'neapolitan' || answered.special === 'neapolitan') return { ...answered, special: keyed.special };
  const minor = (special: Numeral['special']) => special === null || isPlainSixFour(special);
  const oneIsSilent = keyed.special === null || answered.special === null;
  return oneIsSilent && minor(keyed.special) && minor(answered.special) ? { ...answered, special: keyed.special } : answered;
}

function isPlainSixFour(special: Numeral['special']): boolean {
  return special === 'passing-six-four' || special === 'pedal-six-four' || special === 'arpeggiated-six-four';
}

function isAccepted(keyed: Framed, answered: Framed, rubric: Rubric, next: Framed | null): boolean {
  const { degree, inversion, special, quality } = answered.numeral;
  if (inversion !== 2 || special !== null || degree.alter !== 0) return false;
  if (degree.step === 1) return rubric.sixFour.asTonic && quality === keyed.numeral.quality;
  if (degree.step !== 5 || !rubric.sixFour.asDominant) return false;
  // V6/4 names these notes only as the upbeat to the dominant it belongs to; alone it is another chord.
  return !rubric.sixFour.tiedToNext || isItsDominant(answered, next);
}

function isItsDominant(sixFour: Framed, next: Framed | null): boolean {
  if (!next) return false;
  const { degree, inversion } = next.numeral;
  const targets = (framed: Framed) => signNumeral({ ...sixFour.numeral, applied: framed.numeral.applied });
  return degree.step === 5 && degree.alter === 0 && inversion === 0 && targets(next) === targets(sixFour);
}
