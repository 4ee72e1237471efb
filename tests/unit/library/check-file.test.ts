import { describe, expect, it } from 'vitest';
import { checkFile, formatBytes } from '@/components/library/check-file';

const MEGABYTE = 1024 * 1024;

describe('checkFile', () => {
  it.each(['a.musicxml', 'a.xml', 'A.MXL'])('passes %s', (name) => {
    expect(checkFile({ name, size: 10 * MEGABYTE })).toBeNull();
  });

  it('says what is wrong and what to do', () => {
    expect(checkFile({ name: 'a.pdf', size: 5 })).toMatch(/MusicXML.*Export/);
    expect(checkFile({ name: 'a.mxl', size: 0 })).toMatch(/empty.*Export/);
    expect(checkFile({ name: 'a.mxl', size: 10 * MEGABYTE + 1 })).toMatch(/10 MB.*compressed/);
  });
});

describe('formatBytes', () => {
  it('chooses a unit', () => {
    expect([12, 2048, 3 * MEGABYTE].map(formatBytes)).toEqual(['12 bytes', '2 kB', '3.0 MB']);
  });
});
