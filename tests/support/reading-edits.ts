import type { Reading } from '@/lib/harmony/reading';
import { formatPitchClass } from '@/lib/theory/pitch';
import { formatNumeralPlain } from '@/lib/theory/numeral-format';
import { READING_TICKS, readingFrom } from './reading-notation';

/** The same notation, as the engine would have it: everything suggested, `certainties` in turn (0.8). */
export function suggestedFrom(notation: string, certainties: readonly number[] = []): Reading {
  const reading = readingFrom(notation);
  return { ...reading, labels: reading.labels.map((l, i) => ({ ...l, state: 'suggested', certainty: certainties[i] ?? 0.8 })) };
}

/** Back into the notation of reading-notation.ts, without bar lines. */
export function numeralsOf(reading: Reading): string {
  return reading.labels
    .flatMap((label) => {
      const region = reading.regions.find((r) => r.start === label.start);
      const tonic = formatPitchClass(label.key.tonic);
      const key = region ? [`${region.key.mode === 'major' ? tonic : tonic.toLowerCase()}:`] : [];
      const length = (label.end - label.start) / READING_TICKS;
      const text = label.numeral ? formatNumeralPlain(label.numeral, label.key.mode) : '_';
      return [...key, length === 1 ? text : `${text}*${length}`];
    })
    .join(' ');
}
