import { err } from '../result';
import { ticks } from '../score/score';
import { type Key, equalKeys } from '../theory/key';
import { type EditError, type EditResult, edited, findKeyAt } from './edit';
import type { KeyRegion, Label, Reading } from './reading';

/** Edits of where labels begin and end. Regions that begin with a moved boundary move with it. */

const UNKNOWN: EditError = { kind: 'label_unknown', message: 'This label is no longer in the reading.' };

/** Splits a label at a moment strictly inside it; both halves keep the numeral, the second gets `newId`. */
export function splitLabel(reading: Reading, labelId: string, at: number, newId: string): EditResult {
  const index = reading.labels.findIndex((l) => l.id === labelId);
  const label = reading.labels[index];
  if (!label) return err(UNKNOWN);
  if (at <= label.start || at >= label.end) return err(outside('A label can only be split at a note inside it.'));
  const first: Label = { ...label, end: ticks(at), pivot: undefined };
  const state = label.numeral ? 'changed' : label.state;
  const key = findKeyAt(reading, at) ?? label.key;
  const second: Label = { ...label, id: newId, key, start: ticks(at), state, certainty: null, others: [] };
  return edited(reading, { ...reading, labels: reading.labels.toSpliced(index, 1, first, second) });
}

/** Joins a label with the one after it. The first one's numeral stays; a blank takes the second's. */
export function mergeWithNext(reading: Reading, labelId: string): EditResult {
  const index = reading.labels.findIndex((l) => l.id === labelId);
  const label = reading.labels[index];
  const next = reading.labels[index + 1];
  if (!label) return err(UNKNOWN);
  if (!next) return err({ kind: 'nothing_after', message: 'There is no label after this one to join it with.' });
  const numeral = label.numeral ?? (equalKeys(label.key, next.key) ? next.numeral : null);
  const tones = [...(label.tones ?? []), ...(next.tones ?? [])];
  const merged: Label = { ...label, end: next.end, numeral, state: 'changed', certainty: null, pivot: next.pivot, tones: tones.length > 0 ? tones : undefined };
  const regions = next.end === reading.end ? dropRegionFrom(reading, next.start) : moveRegion(reading.regions, next.start, next.end);
  return edited(reading, { ...reading, regions, labels: reading.labels.toSpliced(index, 2, merged) });
}

/** Moves the beginning of a label, and with it the end of the one before; both must keep some length. */
export function moveBoundary(reading: Reading, labelId: string, to: number): EditResult {
  const index = reading.labels.findIndex((l) => l.id === labelId);
  const label = reading.labels[index];
  const previous = reading.labels[index - 1];
  if (!label) return err(UNKNOWN);
  if (!previous) return err(outside('The first label begins with the excerpt.'));
  if (to <= previous.start || to >= label.end) return err(outside('A boundary stays between its two neighbours.'));
  const moved = [{ ...previous, end: ticks(to) }, { ...label, start: ticks(to) }].map(asPersonal);
  const regions = moveRegion(reading.regions, label.start, to);
  return edited(reading, { ...reading, regions, labels: reading.labels.toSpliced(index - 1, 2, ...moved) });
}

/** A label whose span a person set is no longer as suggested. */
function asPersonal(label: Label): Label {
  return label.numeral && label.state === 'suggested' ? { ...label, state: 'changed' } : label;
}

function outside(message: string): EditError {
  return { kind: 'boundary_outside', message };
}

/** Moves the region boundary that stands at `from`, if there is one; regions left without length go. */
function moveRegion(regions: readonly KeyRegion[], from: number, to: number): KeyRegion[] {
  if (from === to || !regions.some((r, i) => i > 0 && r.start === from)) return [...regions];
  const moved = regions.flatMap((r): KeyRegion[] => {
    const start = r.start === from ? ticks(to) : r.start > from && r.start < to ? ticks(to) : r.start;
    const end = r.end === from ? ticks(to) : r.end < from && r.end > to ? ticks(to) : r.end;
    return end > start ? [{ ...r, start, end }] : [];
  });
  return joinRegions(moved);
}

/** The region that begins at `from` and reaches the end of the reading falls to the one before it. */
function dropRegionFrom(reading: Reading, from: number): KeyRegion[] {
  const kept = reading.regions.filter((r) => r.start < from || r.start === reading.start);
  return kept.map((r, i) => (i === kept.length - 1 ? { ...r, end: reading.end } : r));
}

/** Neighbouring regions of one key are one region. */
export function joinRegions(regions: readonly KeyRegion[]): KeyRegion[] {
  const joined: KeyRegion[] = [];
  for (const region of regions) {
    const last = joined.at(-1);
    if (last && equalKeys(last.key, region.key)) joined[joined.length - 1] = { ...last, end: region.end };
    else joined.push(region);
  }
  return joined;
}

/** Lays a key over a span, cutting what is there. */
export function layRegion(regions: readonly KeyRegion[], start: number, end: number, key: Key): KeyRegion[] {
  const kept = regions.flatMap((r): KeyRegion[] => [
    ...(r.start < start ? [{ ...r, end: ticks(Math.min(r.end, start)) }] : []),
    ...(r.end > end ? [{ ...r, start: ticks(Math.max(r.start, end)) }] : []),
  ]);
  const laid = [...kept, { start: ticks(start), end: ticks(end), key }].sort((a, b) => a.start - b.start);
  return joinRegions(laid);
}
