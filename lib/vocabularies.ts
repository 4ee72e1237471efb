/**
 * The closed vocabularies that TypeScript, zod and SQL share: one constant each. A word is added at the end of its list
 * and comes with a migration; none is renamed once rows hold it.
 */
export { PAPERS, type Paper } from '@/lib/handout/order';
export { LABEL_STATES, type LabelState } from '@/lib/harmony/reading';
export { SEGMENTATIONS, type Segmentation } from '@/lib/marking/rubric';
export { VERDICTS, type Verdict } from '@/lib/marking/verdict';
export { MODES, type Mode } from '@/lib/theory/key';
export { QUALITIES, type Quality } from '@/lib/theory/chord';
export { SPECIALS, type Special } from '@/lib/theory/numeral';

/** What a person is in a department. */
export const ROLES = ['owner', 'instructor', 'assistant', 'student'] as const;
export type Role = (typeof ROLES)[number];

/** What a person is in a course. An owner reaches every course of the department without being in it. */
export const COURSE_ROLES = ['instructor', 'assistant', 'student'] as const;
export type CourseRole = (typeof COURSE_ROLES)[number];

export const SCORE_STATES = ['queued', 'reading', 'ready', 'refused'] as const;
export type ScoreState = (typeof SCORE_STATES)[number];

/** Who made a reading and what for: the engine, a person, an answer key, a student's submission. */
export const READING_KINDS = ['engine', 'person', 'key', 'submission'] as const;
export type ReadingKind = (typeof READING_KINDS)[number];

export const READING_STATES = ['proposing', 'open', 'settled', 'failed'] as const;
export type ReadingState = (typeof READING_STATES)[number];

/** What colleagues may do with a reading that is not theirs. Answer keys and submissions have their own rules. */
export const SHARINGS = ['private', 'comment', 'edit'] as const;
export type Sharing = (typeof SHARINGS)[number];

export const ASSIGNMENT_STATES = ['draft', 'open', 'closed'] as const;
export type AssignmentState = (typeof ASSIGNMENT_STATES)[number];

export const SUBMISSION_STATES = ['working', 'handed_in', 'marked', 'released'] as const;
export type SubmissionState = (typeof SUBMISSION_STATES)[number];

/** A printed handout: ordered, ready to fetch, or given up. */
export const PRINT_STATES = ['queued', 'ready', 'failed'] as const;
export type PrintState = (typeof PRINT_STATES)[number];

export const JOB_STATES = ['queued', 'running', 'done', 'dead'] as const;
export type JobState = (typeof JOB_STATES)[number];

export const OUTBOX_STATES = ['queued', 'sent', 'dead'] as const;
export type OutboxState = (typeof OUTBOX_STATES)[number];

export const SIGN_IN_ATTEMPT_KINDS = ['password', 'link', 'link_request', 'enrolment'] as const;
export type SignInAttemptKind = (typeof SIGN_IN_ATTEMPT_KINDS)[number];
