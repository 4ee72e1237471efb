/**
 * Chord qualities. The first fifteen are those of the report contract; ninths are told from sevenths here and
 * reported as the seventh chord they extend. `other` is a root whose chord is not stated (`V?`, a pedal tone).
 */
export const QUALITIES = [
  'major',
  'minor',
  'diminished',
  'augmented',
  'dominant-seventh',
  'major-seventh',
  'minor-seventh',
  'half-diminished-seventh',
  'diminished-seventh',
  'minor-major-seventh',
  'augmented-major-seventh',
  'augmented-sixth-italian',
  'augmented-sixth-french',
  'augmented-sixth-german',
  'other',
  'dominant-ninth',
  'dominant-minor-ninth',
  'augmented-sixth-swiss',
  'augmented-seventh',
] as const;
export type Quality = (typeof QUALITIES)[number];

/**
 * What a tone is in its chord. `sixth` is an added sixth; `second` and `fourth` stand for the third when suspended,
 * beside it when added.
 */
export const ROLES = ['root', 'third', 'fifth', 'seventh', 'ninth', 'sixth', 'fourth', 'second'] as const;
export type Role = (typeof ROLES)[number];

/** Roles in the order in which they become the bass: inversion 1 has the third in the bass. */
export const STACK = ['root', 'third', 'fifth', 'seventh', 'ninth'] as const satisfies readonly Role[];

/**
 * Chord tones as distances from the root on the line of fifths, in the order of STACK: a major third is +4, a minor
 * third −3, a minor seventh −2, a diminished seventh −9. Augmented sixths are stacked from the root that the report
 * contract gives them: the raised fourth (Italian, German), the second (French), the raised second (Swiss); their
 * "thirds" are diminished and doubly diminished intervals, and the flat sixth is never the root.
 */
export const TEMPLATES: Readonly<Record<Quality, readonly number[]>> = {
  major: [0, 4, 1],
  minor: [0, -3, 1],
  diminished: [0, -3, -6],
  augmented: [0, 4, 8],
  'dominant-seventh': [0, 4, 1, -2],
  'major-seventh': [0, 4, 1, 5],
  'minor-seventh': [0, -3, 1, -2],
  'half-diminished-seventh': [0, -3, -6, -2],
  'diminished-seventh': [0, -3, -6, -9],
  'minor-major-seventh': [0, -3, 1, 5],
  'augmented-major-seventh': [0, 4, 8, 5],
  'augmented-sixth-italian': [0, -10, -6],
  'augmented-sixth-french': [0, 4, -6, -2],
  'augmented-sixth-german': [0, -10, -6, -9],
  other: [0],
  'dominant-ninth': [0, 4, 1, -2, 2],
  'dominant-minor-ninth': [0, 4, 1, -2, -5],
  'augmented-sixth-swiss': [0, -3, -13, -9],
  'augmented-seventh': [0, 4, 8, -2],
};

export type Triad = 'major' | 'minor' | 'diminished' | 'augmented';
export type SeventhSize = 'major' | 'minor' | 'diminished';

/** How many tones the quality stacks: 3 a triad, 4 a seventh chord, 5 a ninth chord, 1 for `other`. */
export function sizeOf(quality: Quality): number {
  return TEMPLATES[quality].length;
}

export function isAugmentedSixth(quality: Quality): boolean {
  return quality.startsWith('augmented-sixth-');
}

const TRIADS: Readonly<Record<string, Triad>> = { '4,1': 'major', '-3,1': 'minor', '-3,-6': 'diminished', '4,8': 'augmented' };
const SEVENTHS: Readonly<Record<number, SeventhSize>> = { 5: 'major', [-2]: 'minor', [-9]: 'diminished' };

/** The triad of a third and a fifth, each a distance from the root on the line of fifths; null when they make none. */
export function findTriad(third: number | undefined, fifth: number | undefined): Triad | null {
  return TRIADS[`${third},${fifth}`] ?? null;
}

/** The triad under the chord; null for augmented sixths and `other`. */
export function triadOf(quality: Quality): Triad | null {
  const [, third, fifth] = TEMPLATES[quality];
  return isAugmentedSixth(quality) ? null : findTriad(third, fifth);
}

/** The seventh over the root; null where there is none, and for augmented sixths and `other`. */
export function seventhOf(quality: Quality): SeventhSize | null {
  const seventh = TEMPLATES[quality][3];
  return seventh === undefined || isAugmentedSixth(quality) ? null : (SEVENTHS[seventh] ?? null);
}

/** The seventh chord of a triad and a seventh; null when the list of qualities has none (a diminished triad with a major seventh). */
export function findSeventhChord(triad: Triad, seventh: SeventhSize): Quality | null {
  return QUALITIES.find((q) => sizeOf(q) === 4 && triadOf(q) === triad && seventhOf(q) === seventh) ?? null;
}

/** Qualities that the report contract has no name for: a ninth without its ninth, the Swiss sixth as it sounds. */
const REPORTED: Readonly<Partial<Record<Quality, Quality>>> = {
  'dominant-ninth': 'dominant-seventh',
  'dominant-minor-ninth': 'dominant-seventh',
  'augmented-sixth-swiss': 'augmented-sixth-german',
  'augmented-seventh': 'other',
};

/** The quality as the report contract names it. */
export function qualityInReport(quality: Quality): Quality {
  return REPORTED[quality] ?? quality;
}

/**
 * Figures from the top down, as printed, by number of tones and inversion.
 * Source: Open Music Theory v1 (CC BY-SA 4.0), thoroughbass figures. Ninth chords: common practice, no source.
 */
const FIGURES: Readonly<Record<number, readonly (readonly string[])[]>> = {
  1: [[]],
  3: [[], ['6'], ['6', '4']],
  4: [['7'], ['6', '5'], ['4', '3'], ['4', '2']],
  5: [['9'], ['7', '6', '5'], ['6', '5', '4', '3'], ['6', '4', '3', '2'], ['7', '6', '4', '2']],
};

const FULL_FIGURES: Readonly<Record<number, readonly (readonly string[])[]>> = {
  1: [[]],
  3: [['5', '3'], ['6', '3'], ['6', '4']],
  4: [['7', '5', '3'], ['6', '5', '3'], ['6', '4', '3'], ['6', '4', '2']],
  5: [['9', '7', '5', '3'], ['7', '6', '5', '3'], ['6', '5', '4', '3'], ['6', '4', '3', '2'], ['7', '6', '4', '2']],
};

/** Figures as printed after the numeral, top first: [] for a triad in root position, ['6','5'] for a seventh chord's first inversion. */
export function figuresOf(quality: Quality, inversion: number): readonly string[] {
  return figuresIn(FIGURES, quality, inversion);
}

/** The same, nothing left out: 5/3, 6/3, 7/5/3, 6/4/2. */
export function fullFiguresOf(quality: Quality, inversion: number): readonly string[] {
  return figuresIn(FULL_FIGURES, quality, inversion);
}

function figuresIn(table: typeof FIGURES, quality: Quality, inversion: number): readonly string[] {
  return table[sizeOf(quality)]?.[inversion] ?? [];
}

export interface FigureForm {
  readonly size: 3 | 4 | 5;
  readonly inversion: 0 | 1 | 2 | 3 | 4;
  /** A 4 stands where the 3 would: the third is suspended. */
  readonly suspended?: true;
}

/** Every way to write figures, digits only, and what each says. Source as above: the shorter forms leave out what is implied. */
export const FIGURE_FORMS: Readonly<Record<string, FigureForm>> = {
  '5': { size: 3, inversion: 0 },
  '53': { size: 3, inversion: 0 },
  '54': { size: 3, inversion: 0, suspended: true },
  '6': { size: 3, inversion: 1 },
  '63': { size: 3, inversion: 1 },
  '64': { size: 3, inversion: 2 },
  '7': { size: 4, inversion: 0 },
  '75': { size: 4, inversion: 0 },
  '73': { size: 4, inversion: 0 },
  '753': { size: 4, inversion: 0 },
  '74': { size: 4, inversion: 0, suspended: true },
  '754': { size: 4, inversion: 0, suspended: true },
  '65': { size: 4, inversion: 1 },
  '653': { size: 4, inversion: 1 },
  '43': { size: 4, inversion: 2 },
  '643': { size: 4, inversion: 2 },
  '42': { size: 4, inversion: 3 },
  '2': { size: 4, inversion: 3 },
  '642': { size: 4, inversion: 3 },
  '9': { size: 5, inversion: 0 },
  '97': { size: 5, inversion: 0 },
  '79': { size: 5, inversion: 0 },
  '975': { size: 5, inversion: 0 },
  '9753': { size: 5, inversion: 0 },
  '765': { size: 5, inversion: 1 },
  '7653': { size: 5, inversion: 1 },
  '6543': { size: 5, inversion: 2 },
  '6432': { size: 5, inversion: 3 },
  '7642': { size: 5, inversion: 4 },
};
