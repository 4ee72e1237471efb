import { z } from 'zod';
import { VERDICTS } from '@/lib/vocabularies';

export const startSubmissionInput = z.object({ assignmentId: z.uuid() });

/** The version the student sees: what is not saved yet must not be left behind. */
export const handInInput = z.object({ submissionId: z.uuid(), version: z.int().min(0) });

const several = z.array(z.uuid()).min(1, 'Choose at least one.').max(2_000, 'Too many at once.');

/** One question's answers of some students: a group of identical ones, or one. */
const answers = z.object({ assignmentId: z.uuid(), startTick: z.int().min(0), submissionIds: several });

export const overrideMarksInput = answers.extend({
  /** Null: as proposed. */
  points: z.number('Write a number.').min(0, 'Not below 0.').max(1_000, 'Too many points.').nullable(),
  verdict: z.enum(VERDICTS).nullable(),
});

export const writeRemarkInput = answers.extend({ remark: z.string().trim().max(2_000, 'At most 2,000 characters.') });

export const settleMarksInput = z.object({
  assignmentId: z.uuid(),
  answers: z.array(z.object({ startTick: z.int().min(0), submissionIds: several })).min(1).max(2_000),
  settled: z.boolean(),
});

export const releaseMarksInput = z.object({ assignmentId: z.uuid(), submissionIds: several });
