import type { StoredReading } from '@/db/queries/reading-rows';
import type { Reading } from '@/lib/harmony/reading';
import { ticks } from '@/lib/score/score';

/** A reading out of its rows, with its units. */
export function readingOf(stored: StoredReading): Reading {
  return {
    start: ticks(stored.start),
    end: ticks(stored.end),
    regions: stored.regions.map((region) => ({ ...region, start: ticks(region.start), end: ticks(region.end) })),
    labels: stored.labels.map((label) => ({ ...label, start: ticks(label.start), end: ticks(label.end) })),
  };
}
