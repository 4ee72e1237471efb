import path from 'node:path';
import { openSync } from 'fontkit';
import { expect, it } from 'vitest';
import { SIGN_OUTLINES } from '@/lib/theory/sign-outlines';

/** Every number of an SVG path; the font's own path is relative nowhere and leaves out nothing. */
function cornersOf(outline: string): number[] {
  return [...outline.matchAll(/-?\d+(?:\.\d+)?/g)].map(Number);
}

it('draws each accidental in the font file with the box of its outline', () => {
  const font = openSync(path.resolve(import.meta.dirname, '../../../app/fonts/understave-signs.otf'));
  if (!('glyphForCodePoint' in font)) throw new Error('a collection');
  for (const [sign, { path: outline }] of Object.entries(SIGN_OUTLINES)) {
    const { minX, maxX, minY, maxY } = font.glyphForCodePoint(sign.codePointAt(0) as number).path.bbox;
    const numbers = cornersOf(outline);
    const xs = numbers.filter((_, i) => i % 2 === 0);
    const ys = numbers.filter((_, i) => i % 2 === 1);
    // A curve stays within its control points, so the outline's box holds the drawing's.
    expect(minX).toBeGreaterThanOrEqual(Math.min(...xs));
    expect(maxX).toBeLessThanOrEqual(Math.max(...xs));
    expect(minY).toBeCloseTo(Math.min(...ys), 0);
    expect(maxY).toBeCloseTo(Math.max(...ys), 0);
  }
});
