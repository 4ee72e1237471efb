import type { StoredLabel, StoredReading } from '@/db/queries/reading-rows';
import type { Assignment } from '@/db/queries/assignments';
import type { KeyReading } from '@/lib/marking/key-reading';
import type { Key } from '@/lib/theory/key';
import { fifths } from '@/lib/theory/pitch';

/**
 * What a student starts from: the key's spans, or in open segmentation one span a bar; the key's regions, or one in the
 * major key of the signature. Of the key's numerals only those that are not asked, and those only when they are given.
 */
export function blankAnswer(assignment: Assignment, key: KeyReading, signature: number, newId: () => string): StoredReading {
  const regions = assignment.keysGiven
    ? key.regions.map((region) => ({ ...region }))
    : [{ start: key.start, end: key.end, key: { tonic: fifths(signature), mode: 'major' as const } }];
  const spans = assignment.segmentation === 'given' ? givenSpans(assignment, key) : barSpans(assignment, key);
  const keyAt = (tick: number): Key => (regions.find((region) => region.start <= tick && tick < region.end) ?? regions[0] as { key: Key }).key;
  const labels = spans.map(({ start, end, numeral }): StoredLabel => {
    const state = numeral ? 'accepted' : 'changed';
    return { id: newId(), start, end, key: keyAt(start), numeral, state, certainty: null, others: [] };
  });
  return { start: key.start, end: key.end, regions, labels };
}

type Span = Pick<StoredLabel, 'start' | 'end' | 'numeral'>;

/** A numeral is only right in its key: without the keys nothing is given. */
function givenSpans(assignment: Assignment, key: KeyReading): Span[] {
  const shows = assignment.othersGiven && assignment.keysGiven;
  return key.labels.map(({ start, end, numeral, asked }) => ({ start, end, numeral: !asked && shows ? numeral : null }));
}

function barSpans(assignment: Assignment, key: KeyReading): Span[] {
  return assignment.bars
    .map((bar) => ({ start: Math.max(bar.start, key.start), end: Math.min(bar.start + bar.length, key.end), numeral: null }))
    .filter((span) => span.end > span.start);
}
