import { eq } from 'drizzle-orm';
import { assignments, submissions } from '@/db/schema';
import { DEFAULT_RUBRIC } from '@/lib/marking/rubric';
import type { Deps } from '@/lib/workflows/deps';
import { READING_TICKS, framedFrom } from '../../support/reading-notation';
import type { World } from '../../support/world';
import { type Case, type Cases, may } from './matrix';

/** Who runs the course, and whoever runs the department. */
const RUNNERS = may('instructor', 'owner');
/** Keys and drafts are for the course's assistants as well, and so is marking. */
const PREPARERS = may('assistant', 'instructor', 'owner');
const MARKERS = PREPARERS;

const draft = (world: World) => ({ assignmentId: world.draftId });
const opened = (world: World) => ({ assignmentId: world.assignmentId });
const handed = (world: World) => ({ assignmentId: world.handedAssignmentId });

const WORDS = {
  title: 'Changed',
  instructions: '',
  segmentation: 'given',
  keysGiven: true,
  othersGiven: true,
  rubric: DEFAULT_RUBRIC,
  opensAt: null,
  dueAt: null,
  closesAt: null,
  attempts: 2,
  showKeyAfterRelease: true,
};

/** V6 for V: on a span that the excerpt's key calls V. */
const alternative = (which: (world: World) => { assignmentId: string }): Case['input'] => (world) => ({
  ...which(world),
  startTick: READING_TICKS,
  chord: framedFrom('C: V6'),
});

const answers = (world: World) => ({ ...handed(world), startTick: 0, submissionIds: [world.handedSubmissionId] });

async function closed(world: World, deps: Deps) {
  await deps.db.update(assignments).set({ state: 'closed' }).where(eq(assignments.id, world.assignmentId));
  return opened(world);
}

/** Marks the student has seen, given by a key that has changed since. */
async function releasedAndStale(world: World, deps: Deps) {
  await deps.db.update(submissions).set({ state: 'released' }).where(eq(submissions.id, world.handedSubmissionId));
  await deps.db.update(assignments).set({ pointsPerLabel: 3 }).where(eq(assignments.id, world.handedAssignmentId));
  return handed(world);
}

export const assignmentCases: Cases = {
  'assignments.create': {
    input: (world) => ({ courseId: world.courseId, title: 'New', readingId: world.keyReadingId, excerptId: world.excerptId }),
    expected: PREPARERS,
  },
  'assignments.change': { input: (world) => ({ ...draft(world), ...WORDS }), expected: PREPARERS },
  'assignments.change (open)': { input: (world) => ({ ...opened(world), ...WORDS }), expected: RUNNERS },
  'assignments.ask': { input: (world) => ({ ...draft(world), questions: [{ startTick: 0, points: 2 }] }), expected: PREPARERS },
  'assignments.accept_alternative': { input: alternative(draft), expected: PREPARERS },
  'assignments.accept_alternative (open)': { input: alternative(opened), expected: RUNNERS },
  'assignments.drop_alternative': { input: alternative(draft), expected: PREPARERS },
  'assignments.open': { input: draft, expected: RUNNERS },
  'assignments.close': { input: opened, expected: RUNNERS },
  'assignments.delete': { input: draft, expected: PREPARERS },
  'submissions.start': { input: opened, expected: may('classmate', 'student') },
  'submissions.hand_in': { input: (world) => ({ submissionId: world.submissionId, version: 0 }), expected: may('student') },
  'submissions.collect': { input: closed, expected: RUNNERS },
  'marks.override': { input: (world) => ({ ...answers(world), points: 0, verdict: null }), expected: MARKERS },
  'marks.remark': { input: (world) => ({ ...answers(world), remark: 'Look again' }), expected: MARKERS },
  'marks.settle': {
    input: (world) => ({ ...handed(world), answers: [{ startTick: 0, submissionIds: [world.handedSubmissionId] }], settled: true }),
    expected: MARKERS,
  },
  'marks.release': { input: (world) => ({ ...handed(world), submissionIds: [world.handedSubmissionId] }), expected: RUNNERS },
  'marks.again': { input: handed, expected: MARKERS },
  'marks.again (released)': { input: releasedAndStale, expected: { ...MARKERS, assistant: 'in_use' } },
};
