import { describe, expect, it } from 'vitest';
import { safePath } from '@/lib/http/safe-path';

describe('safePath', () => {
  it.each(['/', '/desk/1?bar=2#x', '/library'])('keeps %s', (path) => {
    expect(safePath(path)).toBe(path);
  });

  it.each([undefined, '', 'library', 'https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', '/a\nb'])(
    'gives the start for %j',
    (path) => {
      expect(safePath(path)).toBe('/');
    },
  );
});
