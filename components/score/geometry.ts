import type { Bar, Note, Ticks } from '@/lib/score/score';

/**
 * Where the engraver put things. All lengths are engraving pixels: one staff space is 10, before any zoom; x from the
 * sheet's left edge, y downwards from its top. Times are ticks of the whole score, so that sheets of one score agree.
 */
export interface SheetGeometry {
  readonly width: number;
  readonly height: number;
  readonly systems: readonly SystemBox[];
  /** In time order; they tile the sheet's bars. */
  readonly bars: readonly BarBox[];
  readonly heads: readonly NoteHead[];
}

export interface SystemBox {
  readonly index: number;
  readonly left: number;
  readonly right: number;
  /** Top line of its highest staff, bottom line of its lowest. */
  readonly staffTop: number;
  readonly staffBottom: number;
  /** First y below everything engraved: our lanes start here. */
  readonly laneTop: number;
}

/** A moment and the left edge of what is drawn for it. */
export interface Anchor {
  readonly tick: number;
  readonly x: number;
}

export interface BarBox {
  /** Index in `Score.bars`. */
  readonly bar: number;
  readonly system: number;
  readonly left: number;
  readonly right: number;
  readonly start: number;
  readonly end: number;
  /** Sorted by tick, one per tick, the first at `start`; x never falls. */
  readonly anchors: readonly Anchor[];
}

/** A drawn note head. `rank` counts from below among the heads of the same part, staff and moment. */
export interface NoteHead {
  readonly part: number;
  readonly staff: number;
  readonly tick: number;
  readonly rank: number;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly system: number;
}

export interface Place {
  readonly system: number;
  readonly x: number;
}

/** A span's part on one system. `begins` and `ends` say whether the span's own ends are in it. */
export interface Piece extends Place {
  readonly right: number;
  readonly begins: boolean;
  readonly ends: boolean;
}

export function findBarAt(geometry: SheetGeometry, tick: number): BarBox | null {
  return geometry.bars.find((box) => tick >= box.start && tick < box.end) ?? null;
}

/** x of a moment within its bar: at its note where there is one, else in proportion between the neighbours. */
export function placeInBar(box: BarBox, tick: number): number {
  const after = box.anchors.findIndex((a) => a.tick > tick);
  const from = box.anchors[after === -1 ? box.anchors.length - 1 : Math.max(0, after - 1)];
  if (!from) return box.left;
  const to = after === -1 ? { tick: box.end, x: box.right } : (box.anchors[after] as Anchor);
  if (tick <= from.tick || to.tick <= from.tick) return from.x;
  return from.x + ((to.x - from.x) * (tick - from.tick)) / (to.tick - from.tick);
}

/** Null when the moment is not on this sheet. */
export function placeTick(geometry: SheetGeometry, tick: number): Place | null {
  const box = findBarAt(geometry, tick);
  return box && { system: box.system, x: placeInBar(box, tick) };
}

/** A span cut at the system breaks, in order; empty when none of it is on this sheet. */
export function cutSpan(geometry: SheetGeometry, start: number, end: number): Piece[] {
  const pieces: Piece[] = [];
  for (const box of geometry.bars) {
    if (box.end <= start || box.start >= end) continue;
    const begins = start >= box.start;
    const ends = end <= box.end;
    const right = end < box.end ? placeInBar(box, end) : box.right;
    const last = pieces.at(-1);
    if (last && last.system === box.system) pieces[pieces.length - 1] = { ...last, right, ends };
    else pieces.push({ system: box.system, x: begins ? placeInBar(box, start) : box.left, right, begins, ends });
  }
  return pieces;
}

/** The moment nearest to a point of a system among `ticks` (sorted onsets): what a pointer snaps to. */
export function snapTick(geometry: SheetGeometry, system: number, x: number, ticks: readonly number[]): number | null {
  let best: number | null = null;
  let distance = Infinity;
  for (const tick of ticks) {
    const place = placeTick(geometry, tick);
    if (!place || place.system !== system) continue;
    if (Math.abs(place.x - x) < distance) [best, distance] = [tick, Math.abs(place.x - x)];
  }
  return best;
}

/** The system whose staves and lanes hold `y`. */
export function findSystemAt(geometry: SheetGeometry, y: number): SystemBox | null {
  return geometry.systems.findLast((s) => y >= s.staffTop - 30) ?? geometry.systems[0] ?? null;
}

/** The head drawn for a written note of `note` that starts at `tick`: same part and staff, same place from below. */
export function findHead(geometry: SheetGeometry, score: readonly Note[], note: Note, tick: Ticks): NoteHead | null {
  const together = score.filter((n) => n.part === note.part && n.staff === note.staff && n.attacks.includes(tick));
  const heads = geometry.heads.filter((h) => h.part === note.part && h.staff === note.staff && h.tick === tick);
  const rank = together.sort(byHeight).findIndex((n) => n.id === note.id);
  return heads.find((h) => h.rank === (heads.length === together.length ? rank : Math.min(rank, heads.length - 1))) ?? null;
}

function byHeight(a: Note, b: Note): number {
  return a.pitch.octave - b.pitch.octave || letterStep(a) - letterStep(b) || a.pitch.fifths - b.pitch.fifths || a.id - b.id;
}

/** 0 for C to 6 for B. */
function letterStep(note: Note): number {
  return (((note.pitch.fifths * 4) % 7) + 7) % 7;
}

/** Sorted, one anchor per tick (the leftmost), started at the bar's start, x made monotone. */
export function tidyAnchors(found: readonly Anchor[], start: number, startX: number): Anchor[] {
  const leftmost = new Map<number, number>();
  for (const { tick, x } of found) leftmost.set(tick, Math.min(x, leftmost.get(tick) ?? Infinity));
  if (!leftmost.has(start)) leftmost.set(start, startX);
  const sorted = [...leftmost].sort((a, b) => a[0] - b[0]);
  let edge = -Infinity;
  return sorted.map(([tick, x]) => ({ tick, x: (edge = Math.max(edge, x)) }));
}

/** The bars of `bars` that a span touches, as first and last index. */
export function barRange(bars: readonly Bar[], start: number, end: number): { first: number; last: number } {
  const first = bars.findIndex((b) => b.start + b.length > start);
  const last = bars.findLastIndex((b) => b.start < end);
  return { first: Math.max(0, first), last: Math.max(0, last) };
}
