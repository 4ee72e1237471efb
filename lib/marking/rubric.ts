import { PARTS, type Part } from './verdict';

export const SEGMENTATIONS = ['given', 'open'] as const;
/** `given`: the student fills in the asked spans. `open`: the student also decides where the chords change. */
export type Segmentation = (typeof SEGMENTATIONS)[number];

/**
 * How answers earn points; plain data, kept with the assignment. Credits are shares of one, 0 to 1.
 * A span's credit is the sum of the shares of its right parts over the sum of the shares that apply to it: `applied`
 * applies when the key or the answer is an applied chord, `function` when two kinds of six-four are confused, `key`
 * when keys are asked, `boundary` in open segmentation.
 * Written pitches never count as their enharmonic equivalents: there is no switch for it.
 */
export interface Rubric {
  /** Full marks of a label that has none of its own. */
  readonly pointsPerLabel: number;
  /** Points are multiples of this; what is not wholly right never rounds up to full marks. */
  readonly pointStep: number;
  readonly shares: Readonly<Record<Part, number>>;
  /** Nothing is earned by the other parts while the root is wrong. */
  readonly rootFirst: boolean;
  /** Root, quality and target earn only together: the numeral is right as a whole or not at all. */
  readonly wholeNumeral: boolean;
  /** Where a wrong seventh counts: as a matter of the chord's quality or of its figures. */
  readonly seventhIn: 'quality' | 'inversion';
  /** Upper and lower case of the numeral are not told apart. */
  readonly caseIgnored: boolean;
  /** A wrong accidental before the numeral voids the label; otherwise it costs half of the root. */
  readonly accidentalVoids: boolean;
  /** Share of that part for the right triad with its seventh overlooked, added or of the wrong kind. */
  readonly seventhCredit: number;
  /** Share of the credit that is left for the right numeral applied to the wrong chord: V7/IV for V7/V. */
  readonly targetCredit: number;
  /** Credit for the same chord tonicised where the key modulates, or the other way round. */
  readonly frameCredit: number;
  /** A numeral that is right in the key's key earns its parts although the student is in another key. */
  readonly followThrough: boolean;
  /** How a cadential six-four may be written besides its own sign: as the tonic's, or as the dominant's. */
  readonly sixFour: {
    readonly asTonic: boolean;
    readonly asDominant: boolean;
    /** V6/4 counts only when the answer's next label is the dominant it resolves to. */
    readonly tiedToNext: boolean;
  };
  /** In open segmentation, how far off a change may be, in quarter notes. */
  readonly boundaryTolerance: number;
}

const EVERY_PART: Rubric = {
  pointsPerLabel: 2,
  pointStep: 0.5,
  shares: { root: 3, quality: 2, inversion: 2, applied: 2, function: 1, key: 1, boundary: 1 },
  rootFirst: true,
  wholeNumeral: false,
  seventhIn: 'quality',
  caseIgnored: false,
  accidentalVoids: false,
  seventhCredit: 0.5,
  targetCredit: 0.5,
  frameCredit: 1,
  followThrough: true,
  sixFour: { asTonic: true, asDominant: true, tiedToNext: true },
  boundaryTolerance: 0,
};

export const RUBRIC_PRESETS = {
  'every-part': {
    name: 'Every part counts',
    description: 'Root, quality and inversion each earn their share; two points a label, in halves.',
    rubric: EVERY_PART,
  },
  'numeral-and-figures': {
    name: 'Numeral half, figures half',
    description: 'One point a label: half for the numeral, half for its figures; a wrong accidental voids it.',
    rubric: {
      ...EVERY_PART,
      pointsPerLabel: 1,
      shares: { root: 1, quality: 0, inversion: 1, applied: 0, function: 0, key: 0, boundary: 0 },
      wholeNumeral: true,
      seventhIn: 'inversion',
      accidentalVoids: true,
      seventhCredit: 0,
      targetCredit: 0,
      caseIgnored: true,
    },
  },
  'all-or-nothing': {
    name: 'All or nothing',
    description: 'One point for a label that is wholly right.',
    rubric: { ...EVERY_PART, pointsPerLabel: 1, pointStep: 1, targetCredit: 0, seventhCredit: 0 },
  },
  'roots-and-keys': {
    name: 'Roots and keys first',
    description: 'For a first look at a piece: the root and the key weigh most, sevenths and inversions little.',
    rubric: {
      ...EVERY_PART,
      shares: { root: 6, quality: 1, inversion: 1, applied: 2, function: 0, key: 4, boundary: 1 },
      seventhCredit: 1,
    },
  },
} as const satisfies Readonly<Record<string, RubricPreset>>;

export interface RubricPreset {
  readonly name: string;
  readonly description: string;
  readonly rubric: Rubric;
}
export type RubricPresetName = keyof typeof RUBRIC_PRESETS;

export const DEFAULT_RUBRIC: Rubric = EVERY_PART;

/** What is wrong with a rubric, in words; empty when it can be used. */
export function checkRubric(rubric: Rubric): string[] {
  const findings: string[] = [];
  if (!(rubric.pointsPerLabel > 0)) findings.push('A label must be worth more than no points.');
  if (!(rubric.pointStep > 0)) findings.push('Points need a step above nought, such as 0.5.');
  if (PARTS.some((part) => !(rubric.shares[part] >= 0))) findings.push('No share may be below nought.');
  if (!(rubric.shares.root > 0)) findings.push('The root needs a share.');
  const credits = [rubric.seventhCredit, rubric.targetCredit, rubric.frameCredit];
  if (credits.some((credit) => !(credit >= 0 && credit <= 1))) findings.push('Credits lie between 0 and 1.');
  if (!(rubric.boundaryTolerance >= 0)) findings.push('A tolerance cannot be below nought.');
  return findings;
}
