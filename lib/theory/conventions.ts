import type { Numeral } from './numeral';

/**
 * A course's spelling of labels. It decides how a numeral is printed and how a typed one is read; it never changes
 * what a numeral is. Every choice has a name that says what is seen on paper.
 */
export const CADENTIAL_FORMS = ['named', 'dominant', 'tonic'] as const;
export const APPLIED_FORMS = ['slash', 'of'] as const;
export const NEAPOLITAN_FORMS = ['N', 'flat-two'] as const;
export const FIGURE_STYLES = ['stacked', 'slashed'] as const;
export const CASE_FORMS = ['by-quality', 'all-capitals'] as const;
export const ACCIDENTAL_FORMS = ['from-key', 'borrowed-plain', 'from-major'] as const;
export const HALF_DIMINISHED_FORMS = ['marked', 'plain'] as const;
export const AUGMENTED_SIXTH_FORMS = ['figured', 'plus-six'] as const;

export interface ConventionSheet {
  /** Cadential six-four: `Cad6/4` · `V6/4` going on to 5/3 · `I6/4`. */
  readonly cadential: (typeof CADENTIAL_FORMS)[number];
  /** `V7/V` · `V7 of V`. */
  readonly applied: (typeof APPLIED_FORMS)[number];
  /** `N6` · `♭II6`. */
  readonly neapolitan: (typeof NEAPOLITAN_FORMS)[number];
  /** Figures one above the other · on one line with a slash, `V6/5`. */
  readonly figures: (typeof FIGURE_STYLES)[number];
  /** Capitals for major and small letters for minor · capitals throughout, the key's own triads unmarked. */
  readonly case: (typeof CASE_FORMS)[number];
  /**
   * Accidentals before a numeral: counted from the key's own scale (♭VI in major, VI in minor) · the same, but the
   * borrowed III, VI and VII of major left plain · counted from the major scale in both modes (♭VI in minor too).
   */
  readonly accidentals: (typeof ACCIDENTAL_FORMS)[number];
  /** `viiø7` · `vii7`, where the key's own seventh chord on that degree is half-diminished. */
  readonly halfDiminished: (typeof HALF_DIMINISHED_FORMS)[number];
  /** `Ger65` · `Ger+6`. */
  readonly augmentedSixths: (typeof AUGMENTED_SIXTH_FORMS)[number];
}

/** The form in which no two numerals look alike. */
export const DEFAULT_CONVENTIONS: ConventionSheet = {
  cadential: 'named',
  applied: 'slash',
  neapolitan: 'N',
  figures: 'stacked',
  case: 'by-quality',
  accidentals: 'from-key',
  halfDiminished: 'marked',
  augmentedSixths: 'figured',
};

/** Ready-made sheets, named by what they print. */
export const CONVENTION_PRESETS = {
  'cad64-slash-N6': DEFAULT_CONVENTIONS,
  'V64-slash-N6': { ...DEFAULT_CONVENTIONS, cadential: 'dominant' },
  'I64-slash-N6': { ...DEFAULT_CONVENTIONS, cadential: 'tonic' },
  'I64-of-flatII6': { ...DEFAULT_CONVENTIONS, cadential: 'tonic', applied: 'of', neapolitan: 'flat-two' },
  'V64-slash-flatII6-from-major': {
    ...DEFAULT_CONVENTIONS,
    cadential: 'dominant',
    neapolitan: 'flat-two',
    accidentals: 'from-major',
  },
  'capitals-I64-of-N6': { ...DEFAULT_CONVENTIONS, case: 'all-capitals', cadential: 'tonic', applied: 'of' },
} as const satisfies Readonly<Record<string, ConventionSheet>>;
export type ConventionPreset = keyof typeof CONVENTION_PRESETS;

/** The plain chord that the sheet prints exactly like the cadential six-four. */
export function looksCadential({ degree, quality, inversion, added }: Numeral, sheet: ConventionSheet): boolean {
  if (inversion !== 2 || degree.alter !== 0 || added.length > 0) return false;
  if (sheet.cadential === 'dominant') return degree.step === 5 && quality === 'major';
  return sheet.cadential === 'tonic' && degree.step === 1 && (quality === 'major' || quality === 'minor');
}
