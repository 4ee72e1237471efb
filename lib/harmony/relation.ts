import { modeOf, tonicOf } from './key-terms';

/** Distance of two tonics on the line of fifths, folded to −6 … +6: enharmonic change is no distance of its own. */
export function foldFifths(difference: number): number {
  const folded = ((((difference + 6) % 12) + 12) % 12) - 6;
  return folded === -6 && difference > 0 ? 6 : folded;
}

/** Number of the relation of two keys: modes and the folded distance of the tonics, 0 … 51. */
export function relationOf(from: number, to: number): number {
  return (modeOf(from) * 2 + modeOf(to)) * 13 + foldFifths(tonicOf(to) - tonicOf(from)) + 6;
}

/** Steps between the signatures of two keys, folded as above. */
export function signatureDistance(from: number, to: number): number {
  const difference = tonicOf(to) - 3 * modeOf(to) - (tonicOf(from) - 3 * modeOf(from));
  return Math.abs(foldFifths(difference));
}
