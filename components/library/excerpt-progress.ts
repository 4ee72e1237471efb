import type { StateName } from '@/components/ui';

/** What the library knows of a reading: how many of its labels are accepted or changed. */
export interface ReadingProgress {
  readonly kind: 'engine' | 'person' | 'key' | 'submission';
  readonly state: 'proposing' | 'open' | 'settled' | 'failed';
  readonly labelCount: number;
  readonly settledCount: number;
}

export interface Progress {
  readonly mark: StateName;
  readonly words: string;
}

/** How far one reading is. */
export function progressOfReading(reading: ReadingProgress): Progress {
  if (reading.state === 'proposing') return { mark: 'working', words: 'being worked out' };
  if (reading.state === 'failed') return { mark: 'failed', words: 'no proposal' };
  if (reading.kind === 'engine') return { mark: 'suggested', words: reading.labelCount === 1 ? '1 label proposed' : `${reading.labelCount} labels proposed` };
  const isSettled = reading.state === 'settled' || (reading.labelCount > 0 && reading.settledCount === reading.labelCount);
  return { mark: isSettled ? 'settled' : 'open', words: `${reading.settledCount} of ${reading.labelCount} settled` };
}

/** How far an excerpt is: its most settled reading by a person, or else the proposal. */
export function progressOfExcerpt(readings: readonly ReadingProgress[]): Progress {
  const people = readings.filter(({ kind }) => kind === 'person' || kind === 'key');
  const furthest = people.reduce<ReadingProgress | null>((best, reading) => (best === null || shareOf(reading) > shareOf(best) ? reading : best), null);
  const shown = furthest ?? readings.find(({ kind }) => kind === 'engine');
  return shown ? progressOfReading(shown) : { mark: 'blank', words: 'no reading yet' };
}

function shareOf({ settledCount, labelCount }: ReadingProgress): number {
  return labelCount === 0 ? 0 : settledCount / labelCount;
}

/** Bars as they are printed: `5–12`, `7`; by their place where the score prints no numbers. */
export function formatBars(first: { readonly index: number; readonly number: string }, last: { readonly index: number; readonly number: string }): string {
  const [from, to] = [nameOf(first), nameOf(last)];
  return from === to ? from : `${from}–${to}`;
}

function nameOf({ index, number }: { readonly index: number; readonly number: string }): string {
  return number || `(${index + 1})`;
}
