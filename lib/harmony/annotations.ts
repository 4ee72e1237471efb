import type { Annotation } from '../score/annotation';
import { type Ticks, ticks } from '../score/score';
import { equalKeys } from '../theory/key';
import type { KeyRegion, Label, Reading } from './reading';

/** The labels of a reading as they are written into a score, blanks included. */
export function annotationsOf(reading: Reading): Annotation[] {
  return reading.labels.map(({ start, key, numeral }) => ({ start, key, numeral }));
}

/**
 * A reading of the span from labels that were read from a file: each lasts until the next, what comes before the first
 * is blank, and the key regions follow the labels' keys. They count as accepted: a person wrote them. `newId` makes the
 * labels' ids. null when there is no label in the span.
 */
export function readingFrom(annotations: readonly Annotation[], start: Ticks, end: Ticks, newId: () => string): Reading | null {
  const inside = annotations.filter((annotation) => annotation.start >= start && annotation.start < end);
  const [first] = inside;
  if (!first) return null;
  const blank: Annotation[] = first.start > start ? [{ start, key: first.key, numeral: null }] : [];
  const labels = [...blank, ...inside].map(({ start: from, key, numeral }, i, all): Label => {
    const until = all[i + 1]?.start ?? end;
    return { id: newId(), start: from, end: ticks(until), key, numeral, state: 'accepted', certainty: null, others: [] };
  });
  return { start, end, regions: regionsOf(labels), labels };
}

function regionsOf(labels: readonly Label[]): KeyRegion[] {
  const regions: KeyRegion[] = [];
  for (const { start, end, key } of labels) {
    const last = regions[regions.length - 1];
    if (last && equalKeys(last.key, key)) regions[regions.length - 1] = { ...last, end };
    else regions.push({ start, end, key });
  }
  return regions;
}
