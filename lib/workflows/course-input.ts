import { z } from 'zod';
import { emailInput } from '@/lib/auth/email';
import {
  ACCIDENTAL_FORMS,
  APPLIED_FORMS,
  AUGMENTED_SIXTH_FORMS,
  CADENTIAL_FORMS,
  CASE_FORMS,
  FIGURE_STYLES,
  HALF_DIMINISHED_FORMS,
  NEAPOLITAN_FORMS,
} from '@/lib/theory/conventions';
import { COURSE_ROLES } from '@/lib/vocabularies';

/** A course's convention sheet, whole. */
export const conventionsInput = z.object({
  cadential: z.enum(CADENTIAL_FORMS),
  applied: z.enum(APPLIED_FORMS),
  neapolitan: z.enum(NEAPOLITAN_FORMS),
  figures: z.enum(FIGURE_STYLES),
  case: z.enum(CASE_FORMS),
  accidentals: z.enum(ACCIDENTAL_FORMS),
  halfDiminished: z.enum(HALF_DIMINISHED_FORMS),
  augmentedSixths: z.enum(AUGMENTED_SIXTH_FORMS),
});

export const courseWords = z.object({
  title: z.string().trim().min(1, 'A course needs a title.').max(300, 'At most 300 characters.'),
  term: z.string().trim().max(80, 'At most 80 characters.').default(''),
  code: z.string().trim().max(40, 'At most 40 characters.').default(''),
});

export const courseInput = z.object({ courseId: z.uuid() });
export const changeCourseInput = courseWords.extend({ courseId: z.uuid() });
export const setConventionsInput = z.object({ courseId: z.uuid(), conventions: conventionsInput.nullable() });
export const setEnrolmentInput = z.object({ courseId: z.uuid(), open: z.boolean() });
export const setArchivedInput = z.object({ courseId: z.uuid(), archived: z.boolean() });

/** People on one list; longer lists are added in parts. */
export const MOST_ROWS = 300;

export const addPeopleInput = z.object({
  courseId: z.uuid(),
  role: z.enum(COURSE_ROLES),
  people: z
    .array(z.object({ name: z.string().trim().max(120).default(''), email: emailInput }))
    .min(1, 'The list is empty.')
    .max(MOST_ROWS, `At most ${MOST_ROWS} people at once.`),
});

export const removePersonInput = z.object({ courseId: z.uuid(), userId: z.uuid() });

export const joinCourseInput = z.object({
  code: z
    .string()
    .transform((text) => text.trim().toUpperCase().replace(/\s+/g, ''))
    .pipe(z.string().min(1, 'Type the code you were given.').max(20, 'No code is that long.')),
});
