/** A bar as the library keeps it; `number` is as printed, '' where none is. */
export interface PrintedBar {
  readonly index: number;
  readonly number: string;
}

/**
 * The place of a bar that a person names: by its printed number, or as `(3)` by its place where no number is printed. A
 * number printed several times (another movement, a second ending) means the first at or after `from`, or else the first.
 */
export function findBar(bars: readonly PrintedBar[], text: string, from = 0): number | null {
  const wanted = text.trim();
  const place = /^\((\d+)\)$/.exec(wanted);
  if (place) return bars[Number(place[1]) - 1]?.index ?? null;
  if (wanted === '') return null;
  const named = bars.filter(({ number }) => number.toLowerCase() === wanted.toLowerCase());
  return (named.find(({ index }) => index >= from) ?? named[0])?.index ?? null;
}

/** How a bar is named in a field: as findBar reads it. */
export function formatBar(bars: readonly PrintedBar[], index: number): string {
  return bars[index]?.number || `(${index + 1})`;
}

export interface BarRange {
  readonly first: number;
  readonly last: number;
}

/** What a press on a bar does: the first begins a range, the second ends it, whichever way round. `picking` is the first. */
export function pickBar(picking: number | null, bar: number): { readonly range: BarRange; readonly picking: number | null } {
  if (picking === null) return { range: { first: bar, last: bar }, picking: bar };
  return { range: { first: Math.min(picking, bar), last: Math.max(picking, bar) }, picking: null };
}
