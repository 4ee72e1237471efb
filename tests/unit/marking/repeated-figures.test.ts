import { describe, expect, it } from 'vitest';
import { readRepeatedFigures } from '@/lib/marking/repeated-figures';
import { formatNumeralPlain } from '@/lib/theory/numeral-format';
import { framedFrom } from '../../support/reading-notation';

/** What the figures mean after the label: `'C: V'`, `'6/5'` → `V65`. */
function after(label: string, figures: string): string | null {
  const { key, numeral } = framedFrom(label);
  const read = readRepeatedFigures(figures, numeral, key.mode);
  return read && formatNumeralPlain(read, key.mode);
}

describe('readRepeatedFigures', () => {
  // Source: references §17 item 8 (college-board guidelines 2021): a repeated numeral may be figures only.
  it.each([
    ['C: V', '6', 'V6'],
    ['C: V', '6/5', 'V65'],
    ['C: V7', '4-3', 'V43'],
    ['C: V7', '42', 'V42'],
    ['C: V7', '2', 'V42'],
    ['C: V65', '6', 'V6'],
    ['C: I6', '53', 'I'],
    ['C: ii', '65', 'ii65'],
    ['C: V7/V', '65', 'V65/V'],
    ['C: N6', '64', 'N64'],
    ['c: viio7', '65', 'viio65'],
    ['C: viiø7/V', '43', 'viiø43/V'],
  ])('after %s, %s is %s', (label, figures, expected) => {
    const { key, numeral } = framedFrom(`${label.slice(0, 2)} ${expected}`);
    expect(after(label, figures)).toBe(formatNumeralPlain(numeral, key.mode));
  });

  // Source: references §6 (Open Music Theory, cadence types): 8/6/4 goes to 8/5/3 or 7/5/3.
  it('resolves a cadential six-four', () => {
    expect(after('C: Cad64', '5/3')).toBe('V');
    expect(after('C: Cad64', '7')).toBe('V7');
    expect(after('C: Cad64', '6/5')).toBeNull();
  });

  it('reads nothing else, and nothing after a blank', () => {
    expect(after('C: V', 'V65')).toBeNull();
    expect(after('C: V', '8')).toBeNull();
    expect(after('C: V', '65x')).toBeNull();
    expect(readRepeatedFigures('65', null, 'major')).toBeNull();
  });
});
