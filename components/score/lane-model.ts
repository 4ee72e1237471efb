import type { KeyRegion, Label } from '@/lib/harmony/reading';
import { type Piece, type SheetGeometry, cutSpan } from './geometry';
import { type PlacedItem, layLane } from './lane-layout';

/** Lane heights in engraving pixels, from a system's laneTop down. */
export const KEY_LINE = { top: 0, height: 24 } as const;
export const NUMERAL_LINE = { top: 27, rowHeight: 38 } as const;

/** A label where it begins on this sheet. */
export interface PlacedLabel {
  readonly label: Label;
  readonly system: number;
  readonly placed: PlacedItem;
  /** Where its span goes on to on this system, for the continuation line. */
  readonly right: number;
  /** x of the note it begins with. */
  readonly noteX: number;
}

/** The rest of a label's span on a later system. */
export interface Continuation extends Piece {
  readonly labelId: string;
}

export interface LaneModel {
  readonly labels: readonly PlacedLabel[];
  readonly continuations: readonly Continuation[];
}

/** Lays a sheet's labels. `widthOf` is a label's natural width in engraving pixels, `belowOf` that of a pivot's second numeral. */
export function layLabels(geometry: SheetGeometry, labels: readonly Label[], widthOf: (label: Label) => number, belowOf: (label: Label) => number = () => 0): LaneModel {
  const pieces = labels.flatMap((label) => cutSpan(geometry, label.start, label.end).map((piece) => ({ label, piece })));
  const begun = pieces.filter(({ piece }) => piece.begins);
  const placed = geometry.systems.flatMap((system) => {
    const here = begun.filter(({ piece }) => piece.system === system.index);
    const items = here.map(({ label, piece }) => ({ id: label.id, x: piece.x, width: widthOf(label), below: belowOf(label) }));
    const laid = layLane(items, system.right + 24);
    return here.map(({ label, piece }, i) => ({
      label,
      system: system.index,
      placed: laid[i] as PlacedItem,
      right: piece.right,
      noteX: piece.x,
    }));
  });
  const continuations = pieces.filter(({ piece }) => !piece.begins).map(({ label, piece }) => ({ ...piece, labelId: label.id }));
  return { labels: placed, continuations };
}

export interface KeySpan extends Piece {
  readonly region: KeyRegion;
}

export function layKeys(geometry: SheetGeometry, regions: readonly KeyRegion[]): KeySpan[] {
  return regions.flatMap((region) => cutSpan(geometry, region.start, region.end).map((piece) => ({ ...piece, region })));
}
