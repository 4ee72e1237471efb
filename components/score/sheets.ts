/** The bars of an excerpt cut into sheets that are engraved one by one, so that a long score is drawn near the window only. */
export interface SheetRange {
  /** First and last bar, indices of `Score.bars`. */
  readonly first: number;
  readonly last: number;
}

/** An excerpt up to this long is one sheet: its systems break where the engraver likes. */
const ONE_SHEET_BARS = 48;
const SHEET_BARS = 24;

/** The ranges tile first…last. A short rest is joined to the sheet before it. */
export function cutSheets(first: number, last: number): SheetRange[] {
  const count = last - first + 1;
  if (count <= ONE_SHEET_BARS) return [{ first, last }];
  const sheets = Math.round(count / SHEET_BARS);
  return Array.from({ length: sheets }, (_, i) => ({
    first: first + Math.round((i * count) / sheets),
    last: first + Math.round(((i + 1) * count) / sheets) - 1,
  }));
}

/** Height to reserve for a sheet not engraved yet: like those that are, per bar, or a guess from the number of staves. */
export function guessHeight(range: SheetRange, known: readonly { range: SheetRange; height: number }[], staves: number, width: number): number {
  const bars = range.last - range.first + 1;
  const seen = known.reduce((sum, k) => sum + k.range.last - k.range.first + 1, 0);
  if (seen > 0) return (bars * known.reduce((sum, k) => sum + k.height, 0)) / seen;
  const barsPerSystem = Math.max(1, Math.floor(width / 260));
  return Math.ceil(bars / barsPerSystem) * (staves * 90 + 140) + 40;
}
