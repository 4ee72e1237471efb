import type { ConventionPreset, ConventionSheet } from '@/lib/theory/conventions';

export const PRESET_NAMES: Readonly<Record<ConventionPreset, string>> = {
  'cad64-slash-N6': 'Cad6/4, V/V, N6',
  'V64-slash-N6': 'V6/4, V/V, N6',
  'I64-slash-N6': 'I6/4, V/V, N6',
  'I64-of-flatII6': 'I6/4, V of V, ♭II6',
  'V64-slash-flatII6-from-major': 'V6/4, V/V, ♭II6, accidentals from the major scale',
  'capitals-I64-of-N6': 'Capitals throughout, I6/4, V of V, N6',
};

type Choices = {
  readonly [F in keyof ConventionSheet]: {
    readonly field: F;
    readonly label: string;
    readonly options: readonly { readonly value: ConventionSheet[F]; readonly words: string }[];
  };
}[keyof ConventionSheet];

export const CONVENTION_CHOICES: readonly Choices[] = [
  {
    field: 'cadential',
    label: 'Cadential six-four',
    options: [
      { value: 'named', words: 'with its own name: Cad6/4' },
      { value: 'dominant', words: 'as the dominant’s: V6/4' },
      { value: 'tonic', words: 'as the tonic’s: I6/4' },
    ],
  },
  {
    field: 'applied',
    label: 'Applied chords',
    options: [
      { value: 'slash', words: 'with a slash: V7/V' },
      { value: 'of', words: 'in words: V7 of V' },
    ],
  },
  {
    field: 'neapolitan',
    label: 'Neapolitan',
    options: [
      { value: 'N', words: 'N6' },
      { value: 'flat-two', words: '♭II6' },
    ],
  },
  {
    field: 'case',
    label: 'Capitals and small letters',
    options: [
      { value: 'by-quality', words: 'capitals for major, small letters for minor' },
      { value: 'all-capitals', words: 'capitals throughout' },
    ],
  },
  {
    field: 'accidentals',
    label: 'Accidentals before a numeral',
    options: [
      { value: 'from-key', words: 'counted from the key’s own scale' },
      { value: 'borrowed-plain', words: 'the same, borrowed III, VI, VII left plain' },
      { value: 'from-major', words: 'counted from the major scale in both modes' },
    ],
  },
  {
    field: 'figures',
    label: 'Figures',
    options: [
      { value: 'stacked', words: 'one above the other' },
      { value: 'slashed', words: 'on one line: V6/5' },
    ],
  },
  {
    field: 'halfDiminished',
    label: 'The key’s own half-diminished seventh',
    options: [
      { value: 'marked', words: 'with its sign: viiø7' },
      { value: 'plain', words: 'unmarked: vii7' },
    ],
  },
  {
    field: 'augmentedSixths',
    label: 'Augmented sixths',
    options: [
      { value: 'figured', words: 'with figures: Ger6/5' },
      { value: 'plus-six', words: 'with +6: Ger+6' },
    ],
  },
];
