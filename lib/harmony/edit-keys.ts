import { err } from '../result';
import { keyOfNumeral, keyOfTarget } from '../theory/applied';
import { type Key, degreeOfFifths, equalKeys, fifthsOfDegree } from '../theory/key';
import type { Numeral, Target } from '../theory/numeral';
import { type EditResult, edited, equalNumerals, findKeyAt } from './edit';
import { layRegion } from './edit-spans';
import type { Label, Reading } from './reading';

/**
 * What happens to the labels in a span whose key changes: `sound` keeps the chords and finds their numerals in the new
 * key; `numerals` keeps the numerals, which then spell other chords.
 */
export const KEY_CHANGE_KEEPS = ['sound', 'numerals'] as const;
export type KeyChangeKeeps = (typeof KEY_CHANGE_KEEPS)[number];

/** The same chord seen from another key: its root, quality and inversion stay, its degree and targets are read anew. */
export function reframeNumeral(numeral: Numeral, from: Key, to: Key): Numeral {
  if (equalKeys(from, to)) return numeral;
  const frame = keyOfNumeral(from, numeral);
  if (numeral.applied.length > 0 && equalKeys(frame, to)) return nameSpecial({ ...numeral, applied: [] });
  if (numeral.applied.length > 0) return { ...numeral, applied: reframeTargets(numeral.applied, from, to) };
  const degree = degreeOfFifths(to, fifthsOfDegree(from, numeral.degree));
  return nameSpecial({ ...numeral, degree });
}

/** Only the last target is read in the local key; a chain that would point at the tonic itself loses that link. */
function reframeTargets(applied: readonly Target[], from: Key, to: Key): Target[] {
  const nearer = applied.slice(0, -1);
  const last = applied.at(-1) as Target;
  const tonicised = keyOfTarget(from, last);
  if (equalKeys(tonicised, to)) return nearer;
  return [...nearer, { degree: degreeOfFifths(to, tonicised.tonic), mode: tonicised.mode }];
}

/** Specials hold for their degree only: a cadential six-four is a tonic's, a Neapolitan the lowered second's. */
function nameSpecial(numeral: Numeral): Numeral {
  const { degree, quality, special } = numeral;
  const lowered = degree.step === 2 && degree.alter === -1 && (quality === 'major' || quality === 'major-seventh');
  if (lowered) return { ...numeral, special: 'neapolitan' };
  const isTonic = degree.step === 1 && degree.alter === 0;
  const holds = special !== 'neapolitan' && (special !== 'cadential-six-four' || isTonic);
  return holds ? numeral : { ...numeral, special: null };
}

/** Sets a key over [start, end). Labels that begin there follow; a numeral that had to change is a person's from then on. */
export function changeKey(
  reading: Reading,
  start: number,
  end: number,
  key: Key,
  keeps: KeyChangeKeeps,
  reframe: Reframe = reframeNumeral,
): EditResult {
  if (start < reading.start || end > reading.end || start >= end) {
    return err({ kind: 'boundary_outside', message: 'A key holds within the excerpt.' });
  }
  const regions = layRegion(reading.regions, start, end, key);
  const framed: Reading = { ...reading, regions };
  const read: Reframe = keeps === 'sound' ? reframe : (numeral) => numeral;
  return edited(reading, { ...framed, labels: reading.labels.map((label) => rekey(label, findKeyAt(framed, label.start) ?? label.key, read)) });
}

function rekey(label: Label, key: Key, read: Reframe): Label {
  if (equalKeys(label.key, key)) return label;
  if (!label.numeral) return { ...label, key };
  const numeral = read(label.numeral, label.key, key);
  return { ...label, key, numeral, state: 'changed', certainty: null };
}

/** From a label to the next change of key. */
export function changeKeyFrom(reading: Reading, start: number, key: Key, keeps: KeyChangeKeeps): EditResult {
  const region = reading.regions.find((r) => start >= r.start && start < r.end);
  return changeKey(reading, start, region?.end ?? reading.end, key, keeps);
}

/** Takes a region away: the key before it (or, for the first, after it) holds on. */
export function removeRegion(reading: Reading, start: number, keeps: KeyChangeKeeps): EditResult {
  const index = reading.regions.findIndex((r) => r.start === start);
  const region = reading.regions[index];
  const neighbour = reading.regions[index - 1] ?? reading.regions[index + 1];
  if (!region || !neighbour) return err({ kind: 'nothing_changes', message: 'The only key of the excerpt cannot be taken away; change it instead.' });
  return changeKey(reading, region.start, region.end, neighbour.key, keeps);
}

/**
 * Tonicise ⇄ modulate for the labels of a selection: applied chords of one target become a region in its key; labels in
 * a region of their own go back into the key before it.
 */
export function exchangeFrame(reading: Reading, labels: readonly Label[]): EditResult {
  const first = labels[0];
  const last = labels.at(-1);
  if (!first || !last) return err({ kind: 'nothing_changes', message: 'Select the labels first.' });
  const target = labels.flatMap((l) => (l.numeral?.applied.length ? [keyOfNumeral(l.key, l.numeral)] : []))[0];
  if (target) return changeKey(reading, first.start, last.end, target, 'sound');
  const region = reading.regions.findIndex((r) => first.start >= r.start && first.start < r.end);
  const home = reading.regions[region - 1];
  if (!home) return err({ kind: 'nothing_changes', message: 'There is no applied chord here and no key before this one.' });
  return changeKey(reading, first.start, last.end, home.key, 'sound', applyNumeral);
}

/** A chord of a key that is left again, read in the home key: its tonic as a chord of home, the others applied to it. */
function applyNumeral(numeral: Numeral, from: Key, to: Key): Numeral {
  const isTonic = numeral.applied.length === 0 && numeral.degree.step === 1 && numeral.degree.alter === 0 && numeral.special === null;
  if (isTonic || equalKeys(from, to)) return reframeNumeral(numeral, from, to);
  return { ...numeral, applied: [...numeral.applied, { degree: degreeOfFifths(to, from.tonic), mode: from.mode }] };
}

/** How a numeral is read in another key. */
type Reframe = (numeral: Numeral, from: Key, to: Key) => Numeral;

/** How many numerals a change of key would rewrite, for the preview. */
export function countRewritten(before: Reading, after: Reading): number {
  return after.labels.filter((a) => before.labels.some((b) => b.id === a.id && !equalNumerals(a.numeral, b.numeral))).length;
}

/** How a pivot is read in the key that begins after it; null for a label that is none, or where no key begins after it. */
export function findPivot(reading: Pick<Reading, 'regions'>, label: Label): { readonly key: Key; readonly numeral: Numeral } | null {
  const region = label.pivot ? reading.regions.find((r) => r.start === label.end) : undefined;
  if (!region || !label.numeral) return null;
  return { key: region.key, numeral: reframeNumeral(label.numeral, label.key, region.key) };
}

/** Makes a label a pivot, or none again: it must be the last one before another key. */
export function togglePivot(reading: Reading, labelId: string): EditResult {
  const label = reading.labels.find((l) => l.id === labelId);
  const isLast = label && reading.regions.some((r) => r.start === label.end);
  if (!label?.numeral || (!isLast && !label.pivot)) {
    return err({ kind: 'nothing_changes', message: 'A pivot is the last label before another key.' });
  }
  const labels = reading.labels.map((l) => (l.id === labelId ? { ...l, pivot: l.pivot ? undefined : true } : l));
  return edited(reading, { ...reading, labels });
}
