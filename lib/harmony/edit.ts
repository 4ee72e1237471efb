import { type Result, err, ok } from '../result';
import { type Key, equalKeys } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import type { KeyRegion, Label, MarkedTone, NonChordKind, Reading } from './reading';

/**
 * The difference between two states of a reading. `before` and `after` hold only what differs; a label that changed is in
 * both, under the same id. Invariant: taking `before` out of a reading and putting `after` in leaves labels and regions
 * that tile it. The inverse is the same difference with its sides exchanged.
 */
export interface Change {
  readonly labels: { readonly before: readonly Label[]; readonly after: readonly Label[] };
  readonly regions: { readonly before: readonly KeyRegion[]; readonly after: readonly KeyRegion[] };
}

export interface Edited {
  readonly reading: Reading;
  readonly change: Change;
}

export interface EditError {
  readonly kind: 'label_unknown' | 'boundary_outside' | 'nothing_after' | 'nothing_changes' | 'stale';
  /** A sentence for people. */
  readonly message: string;
  /** The labels of a stale change that are no longer as it expects them. */
  readonly labelIds?: readonly string[];
}

export type EditResult = Result<Edited, EditError>;

const UNKNOWN: EditError = { kind: 'label_unknown', message: 'This label is no longer in the reading.' };
const NO_CHANGE: EditError = { kind: 'nothing_changes', message: 'Nothing to change here.' };

export function invertChange(change: Change): Change {
  const { labels, regions } = change;
  return {
    labels: { before: labels.after, after: labels.before },
    regions: { before: regions.after, after: regions.before },
  };
}

/** What leads from one reading to another of the same excerpt. */
export function changeBetween(from: Reading, to: Reading): Change {
  return {
    labels: {
      before: from.labels.filter((a) => !to.labels.some((b) => equalLabels(a, b))),
      after: to.labels.filter((b) => !from.labels.some((a) => equalLabels(a, b))),
    },
    regions: {
      before: from.regions.filter((a) => !to.regions.some((b) => equalRegions(a, b))),
      after: to.regions.filter((b) => !from.regions.some((a) => equalRegions(a, b))),
    },
  };
}

/**
 * Applies a difference. It need not have been made from this very reading: it fits as long as every label and region that
 * it takes out is there unchanged, so that edits of different labels go together. Stale otherwise.
 */
export function applyChange(reading: Reading, change: Change): Result<Reading, EditError> {
  const gone = change.labels.before.filter((a) => !reading.labels.some((b) => equalLabels(a, b)));
  const lost = change.regions.before.some((a) => !reading.regions.some((b) => equalRegions(a, b)));
  if (gone.length > 0 || lost) return err(stale(gone.map((l) => l.id)));
  const labels = reading.labels.filter((l) => !change.labels.before.some((b) => b.id === l.id));
  const { before, after } = change.regions;
  const regions = reading.regions.filter((r) => !before.some((b) => equalRegions(b, r)));
  const changed: Reading = {
    ...reading,
    labels: [...labels, ...change.labels.after].sort((a, b) => a.start - b.start),
    // Untouched, they stay the same value: what was laid out for them need not be laid out anew.
    regions: before.length + after.length === 0 ? reading.regions : [...regions, ...after].sort((a, b) => a.start - b.start),
  };
  return findTileFaults(changed).length > 0 ? err(stale(change.labels.after.map((l) => l.id))) : ok(changed);
}

function stale(labelIds: readonly string[]): EditError {
  return { kind: 'stale', message: 'These labels were changed meanwhile.', labelIds };
}

/** What breaks the invariants of a reading: gaps, overlaps, empty spans, a label whose key is not its region's. */
export function findTileFaults(reading: Reading): string[] {
  const faults = [...tileFaults('label', reading, reading.labels), ...tileFaults('region', reading, reading.regions)];
  if (new Set(reading.labels.map((l) => l.id)).size < reading.labels.length) faults.push('two labels share an id');
  for (const label of reading.labels) {
    const key = findKeyAt(reading, label.start);
    if (!key || !equalKeys(key, label.key)) faults.push(`label at ${label.start} is not in its region's key`);
  }
  return faults;
}

function tileFaults(name: string, reading: Reading, spans: readonly { start: number; end: number }[]): string[] {
  const faults: string[] = [];
  let edge: number = reading.start;
  for (const span of spans) {
    if (span.start !== edge || span.end <= span.start) faults.push(`${name} ${span.start}–${span.end} does not follow ${edge}`);
    edge = span.end;
  }
  if (edge !== reading.end) faults.push(`${name}s end at ${edge}, the reading at ${reading.end}`);
  return faults;
}

export function findKeyAt(reading: Reading, tick: number): Key | null {
  return reading.regions.find((r) => tick >= r.start && tick < r.end)?.key ?? null;
}

export function findLabel(reading: Reading, labelId: string): Label | null {
  return reading.labels.find((l) => l.id === labelId) ?? null;
}

/** Equal in all that a person can see or edit; the engine's runners-up are left out. */
export function equalLabels(a: Label, b: Label): boolean {
  return (
    a.id === b.id &&
    a.start === b.start &&
    a.end === b.end &&
    a.state === b.state &&
    a.certainty === b.certainty &&
    (a.pivot ?? false) === (b.pivot ?? false) &&
    equalTones(a.tones ?? [], b.tones ?? []) &&
    equalKeys(a.key, b.key) &&
    equalNumerals(a.numeral, b.numeral)
  );
}

function equalTones(a: readonly MarkedTone[], b: readonly MarkedTone[]): boolean {
  return a.length === b.length && a.every((tone) => b.some((other) => other.noteId === tone.noteId && other.kind === tone.kind));
}

export function equalRegions(a: KeyRegion, b: KeyRegion): boolean {
  return a.start === b.start && a.end === b.end && equalKeys(a.key, b.key);
}

export function equalNumerals(a: Numeral | null, b: Numeral | null): boolean {
  if (!a || !b) return a === b;
  return (
    a.degree.step === b.degree.step &&
    a.degree.alter === b.degree.alter &&
    a.quality === b.quality &&
    a.inversion === b.inversion &&
    a.special === b.special &&
    a.added.join() === b.added.join() &&
    a.applied.length === b.applied.length &&
    a.applied.every((t, i) => JSON.stringify(flatTarget(t)) === JSON.stringify(flatTarget(b.applied[i] ?? t)))
  );
}

function flatTarget(target: Numeral['applied'][number]): readonly (number | string)[] {
  return [target.degree.step, target.degree.alter, target.mode];
}

/** Every edit ends here: the new reading and what to send. */
export function edited(from: Reading, to: Reading): EditResult {
  const change = changeBetween(from, to);
  const { labels, regions } = change;
  const same = labels.before.length + labels.after.length + regions.before.length + regions.after.length === 0;
  return same ? err(NO_CHANGE) : ok({ reading: to, change });
}

/** Replaces some labels by what `change` makes of them. */
function mapLabels(reading: Reading, ids: readonly string[], change: (label: Label) => Label): EditResult {
  if (!ids.every((id) => findLabel(reading, id))) return err(UNKNOWN);
  const chosen = new Set(ids);
  return edited(reading, { ...reading, labels: reading.labels.map((l) => (chosen.has(l.id) ? change(l) : l)) });
}

/** Writes a numeral, or a blank. Writing what was suggested accepts it; anything else is a person's own. */
export function setNumeral(reading: Reading, labelId: string, numeral: Numeral | null): EditResult {
  return mapLabels(reading, [labelId], (label) => writeNumeral(label, numeral));
}

function writeNumeral(label: Label, numeral: Numeral | null): Label {
  const asIs = numeral !== null && equalNumerals(label.numeral, numeral);
  if (asIs) return label.state === 'suggested' ? { ...label, state: 'accepted' } : label;
  return { ...label, numeral, state: 'changed', certainty: null };
}

/** Accepts those of the labels that are suggestions; the others stay as they are. */
export function acceptLabels(reading: Reading, labelIds: readonly string[]): EditResult {
  return mapLabels(reading, labelIds, (l) => (l.state === 'suggested' && l.numeral ? { ...l, state: 'accepted' } : l));
}

/** Says what kind of non-chord tone a note of a label is; null takes back what was said. */
export function markTone(reading: Reading, labelId: string, noteId: number, kind: NonChordKind | null): EditResult {
  return mapLabels(reading, [labelId], ({ tones = [], ...label }) => {
    const others = tones.filter((tone) => tone.noteId !== noteId);
    const marked = kind ? [...others, { noteId, kind }].sort((a, b) => a.noteId - b.noteId) : others;
    return { ...label, tones: marked.length > 0 ? marked : undefined };
  });
}

/** Suggestions that start in a span and that the engine holds at least this certain (0–1). */
export function findSuggestions(reading: Reading, start: number, end: number, atLeast = 0): readonly Label[] {
  return reading.labels.filter(
    (l) => l.state === 'suggested' && l.numeral && l.start >= start && l.start < end && (l.certainty ?? 0) >= atLeast,
  );
}
