import { z } from 'zod';
import { RUBRIC_PRESETS, type Rubric } from '@/lib/marking/rubric';
import { PARTS } from '@/lib/marking/verdict';
import { ADDED_TONES, SPECIALS } from '@/lib/theory/numeral';
import { MODES, QUALITIES, SEGMENTATIONS } from '@/lib/vocabularies';
import { fifths } from '@/lib/theory/pitch';

const credit = z.number('Write a number.').min(0, 'Not below 0.').max(1, 'At most 1.');
const points = z.number('Write a number.').positive('More than no points.').max(100, 'At most 100 points.');
const share = z.number('Write a number.').min(0, 'Not below 0.').max(100, 'At most 100.');

/** lib/marking's Rubric: one shape for the form, the action and the column. */
export const rubricInput = z.object({
  pointsPerLabel: points,
  pointStep: z.number('Write a number.').min(0.05, 'At least 0.05.').max(10, 'At most 10.'),
  shares: z.record(z.enum(PARTS), share),
  rootFirst: z.boolean(),
  wholeNumeral: z.boolean(),
  seventhIn: z.enum(['quality', 'inversion']),
  caseIgnored: z.boolean(),
  accidentalVoids: z.boolean(),
  seventhCredit: credit,
  targetCredit: credit,
  frameCredit: credit,
  followThrough: z.boolean(),
  sixFour: z.object({ asTonic: z.boolean(), asDominant: z.boolean(), tiedToNext: z.boolean() }),
  boundaryTolerance: z.number('Write a number.').min(0, 'Not below 0.').max(8, 'At most 8 quarters.'),
}) satisfies z.ZodType<Rubric>;

export const rubricPresets = z.enum(Object.keys(RUBRIC_PRESETS) as [keyof typeof RUBRIC_PRESETS]);

const degree = z.object({ step: z.literal([1, 2, 3, 4, 5, 6, 7]), alter: z.int().min(-3).max(3) });
const tonic = z.int().min(-12).max(14).transform(fifths);

/** A numeral in its key, as the browser parsed it. */
export const framedInput = z.object({
  key: z.object({ tonic, mode: z.enum(MODES) }),
  numeral: z.object({
    degree,
    quality: z.enum(QUALITIES),
    inversion: z.literal([0, 1, 2, 3, 4]),
    applied: z.array(z.object({ degree, mode: z.enum(MODES) })).max(6).readonly(),
    special: z.enum(SPECIALS).nullable(),
    added: z.array(z.enum(ADDED_TONES)).max(5).readonly(),
  }),
});

const title = z.string().trim().min(1, 'An assignment needs a title.').max(300, 'At most 300 characters.');
const instant = z.iso.datetime({ offset: true, error: 'This is no date.' }).transform((text) => new Date(text)).nullable();

export const assignmentInput = z.object({ assignmentId: z.uuid() });

export const createAssignmentInput = z.object({
  courseId: z.uuid(),
  title,
  /** A reading to mark against: a key is taken as it is, of any other reading a key is made. */
  readingId: z.uuid(),
  excerptId: z.uuid(),
});

export const changeAssignmentInput = z.object({
  assignmentId: z.uuid(),
  title,
  instructions: z.string().trim().max(5_000, 'At most 5,000 characters.'),
  segmentation: z.enum(SEGMENTATIONS),
  keysGiven: z.boolean(),
  othersGiven: z.boolean(),
  rubric: rubricInput,
  opensAt: instant,
  dueAt: instant,
  closesAt: instant,
  attempts: z.int('Write a whole number.').min(1, 'At least one.').max(20, 'At most 20.'),
  showKeyAfterRelease: z.boolean(),
});

export const setQuestionsInput = z.object({
  assignmentId: z.uuid(),
  questions: z
    .array(z.object({ startTick: z.int().min(0), points: points.nullable() }))
    .max(2_000, 'Too many spans.'),
});

export const acceptAlternativeInput = z.object({ assignmentId: z.uuid(), startTick: z.int().min(0), chord: framedInput });
export const dropAlternativeInput = acceptAlternativeInput;
