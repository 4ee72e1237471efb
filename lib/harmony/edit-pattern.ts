import { err } from '../result';
import { ticks } from '../score/score';
import { type Key, equalKeys } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { fifths } from '../theory/pitch';
import { type EditResult, applyChange, edited, findKeyAt } from './edit';
import { layOver } from './edit-merge';
import type { KeyRegion, Label, Reading } from './reading';

/**
 * Labels taken as a pattern: lengths and numerals, and keys by their distance from the first one's, so that the pattern
 * fits a like passage in another key.
 */
export interface LabelPattern {
  readonly length: number;
  readonly labels: readonly PatternLabel[];
}

interface PatternLabel {
  /** Ticks from the pattern's beginning. */
  readonly from: number;
  readonly to: number;
  readonly numeral: Numeral | null;
  readonly mode: Key['mode'];
  /** Of its tonic from the first label's, on the line of fifths. */
  readonly fifthsAway: number;
}

/** `labels` in order, each following the one before. Null for none. */
export function takePattern(labels: readonly Label[]): LabelPattern | null {
  const [first] = labels;
  const last = labels.at(-1);
  if (!first || !last) return null;
  return {
    length: last.end - first.start,
    labels: labels.map(({ start, end, numeral, key }) => ({
      from: start - first.start,
      to: end - first.start,
      numeral,
      mode: key.mode,
      fifthsAway: key.tonic - first.key.tonic,
    })),
  };
}

/**
 * Lays a pattern from a moment on, in the key that holds there; its own changes of key come with it. What stood there goes,
 * what stood only partly there is cut; the end of the excerpt cuts the pattern. A pattern that begins in the other mode
 * brings its numerals, not its mode.
 */
export function layPattern(reading: Reading, pattern: LabelPattern, at: number, newId: () => string): EditResult {
  const key = findKeyAt(reading, at);
  if (!key || at >= reading.end) return err({ kind: 'boundary_outside', message: 'A pattern is laid within the excerpt.' });
  const opening = pattern.labels[0]?.mode ?? key.mode;
  const placed = pattern.labels.flatMap((label): Label[] => {
    const start = at + label.from;
    const end = Math.min(at + label.to, reading.end);
    if (end <= start) return [];
    const mode = label.fifthsAway === 0 && label.mode === opening ? key.mode : label.mode;
    const own: Key = { tonic: fifths(key.tonic + label.fifthsAway), mode };
    return [{ id: idAt(reading, start) ?? newId(), start: ticks(start), end: ticks(end), key: own, numeral: label.numeral, state: 'changed', certainty: null, others: [] }];
  });
  const regions = placed.filter((label) => !equalKeys(label.key, key)).map(({ start, end, key: own }): KeyRegion => ({ start, end, key: own }));
  const home: KeyRegion = { start: ticks(at), end: placed.at(-1)?.end ?? ticks(at), key };
  const change = layOver(reading, { labels: { before: [], after: placed }, regions: { before: [], after: [home, ...regions] } }, newId);
  const applied = applyChange(reading, change);
  return applied.ok ? edited(reading, applied.value) : applied;
}

/** The label that begins at a moment keeps its id, and with it its remarks. */
function idAt(reading: Reading, start: number): string | undefined {
  return reading.labels.find((label) => label.start === start)?.id;
}
