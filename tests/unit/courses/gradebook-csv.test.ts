import { describe, expect, it } from 'vitest';
import { plainCell } from '@/lib/workflows/gradebook-csv';

describe('plainCell', () => {
  // Source: OWASP, "CSV Injection": cells that begin with these signs are run as formulas by spreadsheet programs.
  it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\tx', '\rx'])('makes %j plain text', (text) => {
    expect(plainCell(text)).toBe(`'${text}`);
  });

  it.each(['Ada Low', 'Ödön', 'O’Neil', '3:2'])('leaves %j as it is', (text) => {
    expect(plainCell(text)).toBe(text);
  });
});
