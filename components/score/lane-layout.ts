/**
 * Where labels stand on the lanes of one system. Pure arithmetic in engraving pixels. Invariant: no two items of one row
 * overlap. A label that meets its neighbour shifts a little, then shrinks, then breaks to the second row; when even that
 * is not enough, it shifts as far as it must.
 */
export interface LaneItem {
  readonly id: string;
  /** Where it wants to begin: at its note. */
  readonly x: number;
  /** Width at full size. */
  readonly width: number;
  /** Width of what stands under it in the second row, at full size; 0 or absent for nothing. */
  readonly below?: number;
}

export interface PlacedItem extends LaneItem {
  /** 0 is the row nearest the staff. */
  readonly row: 0 | 1;
  /** 1, or less when shrunk; never under MIN_SCALE. */
  readonly scale: number;
  /** Where it stands; `x − wanted` is the shift. */
  readonly left: number;
}

export const MIN_SCALE = 0.72;
export const MAX_SHIFT = 7;
export const ITEM_GAP = 5;

/** `items` sorted by x. `right` is where the system ends: an item that would pass it moves left into free room. */
export function layLane(items: readonly LaneItem[], right: number): PlacedItem[] {
  const edges: [number, number] = [-Infinity, -Infinity];
  const placed = items.map((item, index) => {
    const below = item.below ?? 0;
    const row = below > 0 ? 0 : chooseRow(item, edges);
    const left = Math.max(item.x, edges[row], below > 0 ? edges[1] : -Infinity);
    const scale = shrinkTo(item, roomFor(items, index, left, right));
    edges[row] = left + item.width * scale + ITEM_GAP;
    if (below > 0) edges[1] = left + below + ITEM_GAP;
    return { ...item, row, scale, left };
  });
  return pullBack(placed, right);
}

/** The first row when a small shift is enough there; else whichever needs the smaller shift. */
function chooseRow(item: LaneItem, edges: readonly [number, number]): 0 | 1 {
  if (edges[0] - item.x <= MAX_SHIFT) return 0;
  return edges[1] < edges[0] ? 1 : 0;
}

/** Width an item can take before it pushes the next one farther than a small shift. */
function roomFor(items: readonly LaneItem[], index: number, left: number, right: number): number {
  const next = items[index + 1];
  return (next ? Math.min(next.x + MAX_SHIFT - ITEM_GAP, right) : right) - left;
}

/** Shrinks only when that makes it fit; a label that would break to the second row anyway keeps its size. */
function shrinkTo(item: LaneItem, room: number): number {
  if (item.width <= room) return 1;
  const scale = room / item.width;
  return scale >= MIN_SCALE ? scale : 1;
}

/** From the right: what passes the system's end moves left as far as its row has room. */
function pullBack(placed: readonly PlacedItem[], right: number): PlacedItem[] {
  const limits: [number, number] = [right, right];
  const moved = placed.map((item) => ({ ...item }));
  for (let i = moved.length - 1; i >= 0; i -= 1) {
    const item = moved[i] as { -readonly [K in keyof PlacedItem]: PlacedItem[K] };
    const left = Math.min(item.left, limits[item.row] - item.width * item.scale);
    item.left = Math.max(left, freeFrom(moved, i));
    limits[item.row] = item.left - ITEM_GAP;
  }
  return moved;
}

/** Where the items before `index` in its row end when packed as far left as they may go: their wanted places or closer. */
function freeFrom(placed: readonly PlacedItem[], index: number): number {
  const item = placed[index] as PlacedItem;
  const before = placed.slice(0, index).filter((p) => p.row === item.row);
  const last = before.at(-1);
  return last ? last.left + last.width * last.scale + ITEM_GAP : Math.min(item.left, item.x);
}
