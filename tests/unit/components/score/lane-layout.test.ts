import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ITEM_GAP, MAX_SHIFT, MIN_SCALE, type LaneItem, layLane } from '@/components/score/lane-layout';

const items = (...places: readonly (readonly [x: number, width: number])[]): LaneItem[] => places.map(([x, width], i) => ({ id: `${i}`, x, width }));

describe('layLane', () => {
  it('leaves labels that have room where their notes are', () => {
    expect(layLane(items([0, 30], [60, 30]), 200).map((p) => [p.left, p.row, p.scale])).toEqual([[0, 0, 1], [60, 0, 1]]);
  });

  it('shifts a little before anything else', () => {
    const [, second] = layLane(items([0, 30], [31, 30]), 200);
    expect(second).toMatchObject({ row: 0, scale: 1, left: 30 + ITEM_GAP });
  });

  it('then shrinks the one that is in the way', () => {
    const [first, second] = layLane(items([0, 40], [36, 30]), 200);
    expect(first!.scale).toBeLessThan(1);
    expect(first!.scale).toBeGreaterThanOrEqual(MIN_SCALE);
    expect(second).toMatchObject({ row: 0, left: 36 + MAX_SHIFT });
  });

  it('then breaks to the second row, at full size', () => {
    expect(layLane(items([0, 60], [20, 60]), 300).map((p) => [p.left, p.row, p.scale])).toEqual([[0, 0, 1], [20, 1, 1]]);
  });

  it('never lets two labels of a row overlap, nor stand before their notes without need', () => {
    const drawn = fc.array(fc.tuple(fc.integer({ min: 0, max: 600 }), fc.integer({ min: 26, max: 90 })), { maxLength: 30 });
    fc.assert(
      fc.property(drawn, (places) => {
        const placed = layLane(items(...places.sort((a, b) => a[0] - b[0])), 640);
        for (const row of [0, 1]) {
          const inRow = placed.filter((p) => p.row === row).sort((a, b) => a.left - b.left);
          inRow.forEach((p, i) => i > 0 && expect(p.left).toBeGreaterThanOrEqual(inRow[i - 1]!.left + inRow[i - 1]!.width * inRow[i - 1]!.scale));
        }
        for (const p of placed) expect(p.scale).toBeGreaterThanOrEqual(MIN_SCALE);
      }),
    );
  });
});
