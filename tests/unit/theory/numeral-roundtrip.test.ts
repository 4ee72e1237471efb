import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { checkNumeral } from '@/lib/theory/numeral';
import { formatNumeral, formatNumeralPlain } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';

import { anyMode, anyNumeral, anySheet } from '../../support/numerals';

describe('text of a numeral', () => {
  it('parseNumeral(formatNumeral(n)) gives n back under the default sheet', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, (numeral, mode) => {
        const text = formatNumeral(numeral, mode);
        expect({ text, ...parseNumeral(text, mode) }).toEqual({ text, ok: true, value: numeral });
      }),
      { numRuns: 1500 },
    );
  });

  it('parseNumeral(formatNumeral(n)) gives n back under every sheet', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, anySheet, (numeral, mode, sheet) => {
        const text = formatNumeral(numeral, mode, sheet);
        expect({ text, ...parseNumeral(text, mode, sheet) }).toEqual({ text, ok: true, value: numeral });
      }),
      { numRuns: 4000 },
    );
  });

  it('formatNumeralPlain gives ASCII that is read as the same numeral', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, anySheet, (numeral, mode, sheet) => {
        const text = formatNumeralPlain(numeral, mode, sheet);
        expect(text).toMatch(/^[ -~]+$/);
        expect({ text, ...parseNumeral(text, mode, sheet) }).toEqual({ text, ok: true, value: numeral });
      }),
      { numRuns: 1500 },
    );
  });

  it('whatever parseNumeral reads passes checkNumeral and comes back from its own text', () => {
    const scrap = fc.constantFrom(...'b # ♭ ♮ i I v V ii VI vii o 0 ° ø + 6 5 4 3 2 7 9 / of - ( ) add6 sus4 maj m M N It Ger Cad CT Ped pass ? ,'.split(' '), ' ');
    fc.assert(
      fc.property(fc.array(scrap, { maxLength: 8 }), anyMode, anySheet, (scraps, mode, sheet) => {
        const text = scraps.join('');
        const read = parseNumeral(text, mode, sheet);
        if (!read.ok) {
          expect(read.error.offset).toBeGreaterThanOrEqual(0);
          expect(read.error.offset).toBeLessThanOrEqual(text.length);
          expect(read.error.message).toMatch(/\.$/);
          return;
        }
        expect({ text, findings: checkNumeral(read.value) }).toEqual({ text, findings: [] });
        expect(parseNumeral(formatNumeral(read.value, mode, sheet), mode, sheet)).toEqual(read);
      }),
      { numRuns: 6000 },
    );
  });

  it('trailing junk after any canonical text is refused at the place where it begins', () => {
    fc.assert(
      fc.property(anyNumeral, anyMode, fc.constantFrom('x', ' x', '!', ';', '€'), (numeral, mode, junk) => {
        const text = formatNumeral(numeral, mode, DEFAULT_CONVENTIONS);
        const read = parseNumeral(text + junk, mode);
        expect(read.ok).toBe(false);
        if (!read.ok) expect(read.error.offset).toBe(text.length + junk.length - 1);
      }),
    );
  });
});
