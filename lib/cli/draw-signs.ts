/**
 * Makes app/fonts/understave-signs.otf from lib/theory/sign-outlines.ts: `npx tsx lib/cli/draw-signs.ts`. Run it after
 * an outline was changed and commit both; tests/unit/theory/sign-outlines.test.ts compares them.
 */
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { Font, Glyph, Path } from 'opentype.js';
import { SIGN_OUTLINES } from '../theory/sign-outlines';

const NAMES = { '♭': 'flat', '♯': 'sharp', '♮': 'natural', '𝄪': 'doublesharp', '𝄫': 'doubleflat' } as const;

function pathOf(outline: string): Path {
  const drawn = new Path();
  for (const [, verb, numbers] of outline.matchAll(/([MLCZ])([^MLCZ]*)/g)) {
    const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = (numbers ?? '').trim().split(/\s+/).map(Number);
    if (verb === 'M') drawn.moveTo(a, b);
    else if (verb === 'L') drawn.lineTo(a, b);
    else if (verb === 'C') drawn.curveTo(a, b, c, d, e, f);
    else drawn.close();
  }
  return drawn;
}

const empty = new Glyph({ name: '.notdef', advanceWidth: 350, path: new Path() });
const glyphs = Object.entries(SIGN_OUTLINES).map(
  ([sign, { advance, path: outline }]) =>
    new Glyph({ name: NAMES[sign as keyof typeof NAMES], unicode: sign.codePointAt(0) ?? 0, advanceWidth: advance, path: pathOf(outline) }),
);
const font = new Font({
  familyName: 'Understave Signs',
  styleName: 'Regular',
  unitsPerEm: 1000,
  ascender: 900,
  descender: -300,
  designer: 'The Understave authors',
  license: 'MIT',
  glyphs: [empty, ...glyphs],
});

writeFileSync(path.join(import.meta.dirname, '../../app/fonts/understave-signs.otf'), Buffer.from(font.toArrayBuffer()));
