import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const CSS = readFileSync(path.resolve(import.meta.dirname, '../../app/globals.css'), 'utf8');
const THEMES = ['day', 'night'] as const;

/** `--color-ink: light-dark(#231d15, #ece4d2)` → the two values. */
function colour(name: string, theme: (typeof THEMES)[number]): string {
  const match = new RegExp(`--color-${name}: light-dark\\((#[0-9a-f]{6}), (#[0-9a-f]{6})\\);`).exec(CSS);
  if (!match) throw new Error(`no token --color-${name}`);
  return match[theme === 'day' ? 1 : 2] as string;
}

// Source: W3C, WCAG 2.2, "relative luminance" and "contrast ratio".
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const part = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [lighter = 0, darker = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (lighter + 0.05) / (darker + 0.05);
}

describe.each(THEMES)('colours by %s', (theme) => {
  // Source: WCAG 2.2, 1.4.3: text of normal size needs 4.5:1.
  it.each(['ink', 'ink-soft', 'madder', 'verdigris', 'ochre'])('can be read: %s on every ground', (name) => {
    for (const ground of ['paper', 'sheet', 'bench', 'selection', 'madder-wash', 'verdigris-wash', 'ochre-wash']) {
      const isState = ['madder', 'verdigris', 'ochre'].includes(name);
      if (isState && ground.endsWith('-wash') && ground !== `${name}-wash`) continue;
      expect([ground, contrast(colour(name, theme), colour(ground, theme)) >= 4.5]).toEqual([ground, true]);
    }
  });

  it('can be read: paper on ink, as buttons are', () => {
    expect(contrast(colour('paper', theme), colour('ink', theme))).toBeGreaterThanOrEqual(4.5);
    expect(contrast(colour('paper', theme), colour('ink-soft', theme))).toBeGreaterThanOrEqual(4.5);
  });

  // Source: WCAG 2.2, 1.4.11: the edges of controls need 3:1.
  it('shows the edges of controls', () => {
    for (const ground of ['paper', 'sheet']) expect([ground, contrast(colour('rule-strong', theme), colour(ground, theme)) >= 3]).toEqual([ground, true]);
  });
});
