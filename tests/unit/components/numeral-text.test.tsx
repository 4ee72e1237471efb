// @vitest-environment jsdom
import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { KeyName, NumeralText } from '@/components/score/numeral-text';
import { unwrap } from '@/lib/result';
import { CONVENTION_PRESETS, type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths } from '@/lib/theory/pitch';
import { typesetNumeral } from '@/lib/theory/typeset';

afterEach(cleanup);

function renderNumeral(text: string, sheet: ConventionSheet = DEFAULT_CONVENTIONS) {
  const numeral = unwrap(parseNumeral(text, 'major', sheet));
  render(<NumeralText parts={typesetNumeral(numeral, 'major', sheet)} />);
  return screen.getByRole('img');
}

/** What is set, from left to right and top to bottom within a stack. */
function pieces(drawing: HTMLElement): (string | null)[] {
  return [...drawing.querySelectorAll('text')].map((text) => text.textContent);
}

function place(drawing: HTMLElement, piece: string): { x: number; y: number } {
  const text = [...drawing.querySelectorAll('text')].find((each) => each.textContent === piece);
  return { x: Number(text?.getAttribute('x')), y: Number(text?.getAttribute('y')) };
}

describe('NumeralText', () => {
  // Common practice, no source: the figures of an inversion stand one above the other, the larger on top.
  it('stacks 6 over 5 after the letters', () => {
    const drawing = renderNumeral('V65');
    expect(pieces(drawing)).toEqual(['V', '6', '5']);
    expect(place(drawing, '6').x).toBe(place(drawing, '5').x);
    expect(place(drawing, '6').y).toBeLessThan(place(drawing, '5').y);
    expect(place(drawing, '6').x).toBeGreaterThan(place(drawing, 'V').x);
  });

  it('sets an applied chord as chord, joint and target, and says it in words', () => {
    const drawing = renderNumeral('viiø7/V');
    expect(pieces(drawing)).toEqual(['vii', 'ø', '7', '/', 'V']);
    expect(drawing.getAttribute('aria-label')).toMatch(/half-diminished/);
    expect(drawing.getAttribute('aria-label')).toMatch(/seven of five$/);
  });

  it('writes "of" where the convention sheet does', () => {
    const drawing = renderNumeral('V7 of V', CONVENTION_PRESETS['I64-of-flatII6']);
    expect(pieces(drawing)).toEqual(['V', '7', 'of', 'V']);
  });

  it('puts the accidental before the letters', () => {
    const drawing = renderNumeral('bVI6');
    expect(pieces(drawing)).toEqual(['♭', 'VI', '6']);
  });

  it('is silent when what surrounds it says the name', () => {
    const numeral = unwrap(parseNumeral('I', 'major'));
    const { container } = render(<NumeralText parts={typesetNumeral(numeral, 'major')} decorative />);
    expect(container.querySelector('svg')?.getAttribute('aria-hidden')).toBe('true');
  });
});

describe('KeyName', () => {
  it('prints the sign and says it', () => {
    const { container } = render(<KeyName keyValue={{ tonic: fifths(-3), mode: 'major' }} />);
    expect(container.textContent).toBe('E♭ majorE flat major');
    expect(container.querySelector('[aria-hidden]')?.textContent).toBe('E♭ major');
  });

  it('writes a minor tonic in small letters', () => {
    const { container } = render(<KeyName keyValue={{ tonic: fifths(7), mode: 'minor' }} />);
    expect(container.querySelector('.sr-only')?.textContent).toBe('c sharp minor');
  });
});
