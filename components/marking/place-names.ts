/** A bar as the database keeps it, in ticks. */
export interface PlacedBar {
  readonly index: number;
  readonly number: string;
  readonly start: number;
  readonly length: number;
  /** Starts of the felt beats from the bar's start. */
  readonly beats?: readonly number[];
}

/** `bar 3, beat 2½`: where a tick stands. Where the beats are not known, the bar alone. */
export function placeOf(bars: readonly PlacedBar[], tick: number): string {
  const bar = barAt(bars, tick);
  if (!bar) return '';
  const beat = beatAt(bar, tick);
  return `${bar.number === '' ? 'upbeat' : `bar ${bar.number}`}${beat ? `, beat ${beat}` : ''}`;
}

/** `3:2½`: bar and beat, for a narrow column. */
export function shortPlaceOf(bars: readonly PlacedBar[], tick: number): string {
  const bar = barAt(bars, tick);
  if (!bar) return '';
  const beat = beatAt(bar, tick);
  return `${bar.number || 'upbeat'}${beat ? `:${beat}` : ''}`;
}

function barAt(bars: readonly PlacedBar[], tick: number): PlacedBar | undefined {
  return bars.find((bar) => bar.start <= tick && tick < bar.start + bar.length);
}

const FRACTIONS: readonly (readonly [number, string])[] = [
  [0, ''],
  [1 / 4, '¼'],
  [1 / 3, '⅓'],
  [1 / 2, '½'],
  [2 / 3, '⅔'],
  [3 / 4, '¾'],
];

function beatAt(bar: PlacedBar, tick: number): string {
  const { beats, length } = bar;
  if (!beats) return '';
  const at = tick - bar.start;
  const index = beats.findLastIndex((start) => start <= at);
  const from = beats[index] ?? 0;
  const part = (at - from) / ((beats[index + 1] ?? length) - from);
  const sign = FRACTIONS.find(([value]) => Math.abs(value - part) < 0.001)?.[1] ?? `+${Math.round(part * 100) / 100}`;
  return `${index + 1}${sign}`;
}
