import path from 'node:path';
import { openSync } from 'fontkit';
import { describe, expect, it } from 'vitest';
import { advanceOf } from '@/lib/theory/numeral-metrics';
import { SIGN_OUTLINES } from '@/lib/theory/sign-outlines';

const ROOT = path.resolve(import.meta.dirname, '../../..');
// Source: the font file of @fontsource/alegreya, read with fontkit.
const alegreya = openFont('node_modules/@fontsource/alegreya/files/alegreya-latin-500-normal.woff2');
// Source: our own font file, read with fontkit.
const signs = openFont('app/fonts/understave-signs.otf');

function openFont(file: string) {
  const font = openSync(path.join(ROOT, file));
  if (!('glyphForCodePoint' in font)) throw new Error(`${file} is a collection`);
  return font;
}

/** The glyph that `dnom` puts in a figure's place: the figures' substitutes lie in one block after the numerators'. */
function smallFigureWidth(figure: string): number {
  const fraction = alegreya.layout(`1⁄${figure}`, ['frac']);
  return fraction.glyphs[2]?.advanceWidth ?? Number.NaN;
}

describe('advanceOf', () => {
  it('gives every letter and mark of a numeral its width in Alegreya Medium', () => {
    for (const character of 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz°ø+?/–- ()') {
      expect([character, advanceOf(character, 'letters')]).toEqual([character, alegreya.glyphForCodePoint(character.codePointAt(0) as number).advanceWidth]);
    }
  });

  it('keeps the small figures in proportion to those of the font', () => {
    const scale = advanceOf('0', 'figure') / smallFigureWidth('0');
    for (const figure of '123456789') expect(advanceOf(figure, 'figure')).toBeCloseTo(smallFigureWidth(figure) * scale, 6);
  });

  it('gives every accidental its width in our own font', () => {
    for (const sign of Object.keys(SIGN_OUTLINES)) {
      expect(signs.hasGlyphForCodePoint(sign.codePointAt(0) as number)).toBe(true);
      expect([sign, advanceOf(sign, 'sign')]).toEqual([sign, signs.glyphForCodePoint(sign.codePointAt(0) as number).advanceWidth]);
    }
  });
});
