import { ticks } from '../score/score';
import { type Change, applyChange, changeBetween, findKeyAt, invertChange } from './edit';
import { layRegion } from './edit-spans';
import type { Label, Reading } from './reading';

/**
 * Writes what `mine` wanted over a reading that has moved on: labels and regions of `mine.after` are laid over whatever
 * stands in their spans now; what only partly lies there is cut. Returns the change to make; `newId` names cut-off rests.
 */
export function layOver(reading: Reading, mine: Change, newId: () => string): Change {
  const regions = mine.regions.after.reduce((all, r) => layRegion(all, r.start, r.end, r.key), [...reading.regions]);
  const labels = mine.labels.after.reduce((all, label) => layLabel(all, label, newId), [...reading.labels]);
  const framed: Reading = { ...reading, regions, labels };
  const rekeyed = labels.map((label) => ({ ...label, key: findKeyAt(framed, label.start) ?? label.key }));
  return changeBetween(reading, { ...framed, labels: rekeyed });
}

function layLabel(labels: readonly Label[], laid: Label, newId: () => string): Label[] {
  const cut = labels.flatMap((label) => cutOut(label, laid));
  const used = new Set([laid.id]);
  const named = cut.map((label) => {
    const id = used.has(label.id) ? newId() : label.id;
    used.add(id);
    return { ...label, id };
  });
  return [...named, laid].sort((a, b) => a.start - b.start);
}

/** What is left of a label outside another's span: none, one or two pieces. */
function cutOut(label: Label, laid: Label): Label[] {
  if (label.end <= laid.start || label.start >= laid.end) return [label];
  return [
    ...(label.start < laid.start ? [{ ...label, end: ticks(laid.start) }] : []),
    ...(label.end > laid.end ? [{ ...label, start: ticks(laid.end) }] : []),
  ];
}

/** Applies changes in order; those that do not fit (their labels have moved on) are left out. */
export function foldChanges(reading: Reading, changes: readonly Change[]): Reading {
  return changes.reduce((current, change) => {
    const applied = applyChange(current, change);
    return applied.ok ? applied.value : current;
  }, reading);
}

/**
 * The reading as it was before some changes: `changes` in the order they were made, the last of them the reading's newest.
 * Null when one of them does not fit, so that they are not all of what happened since.
 */
export function rewind(reading: Reading, changes: readonly Change[]): Reading | null {
  return changes.reduceRight<Reading | null>((current, change) => {
    const applied = current && applyChange(current, invertChange(change));
    return applied?.ok ? applied.value : null;
  }, reading);
}
