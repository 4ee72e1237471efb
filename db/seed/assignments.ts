import { eq } from 'drizzle-orm';
import { deleteReadingContent, insertReadingContent, unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { findOwnSubmission, listSubmissions } from '@/db/queries/submissions';
import { assignments, readings } from '@/db/schema';
import { createAssignment } from '@/lib/workflows/create-assignment';
import type { Deps } from '@/lib/workflows/deps';
import { handIn } from '@/lib/workflows/hand-in';
import { closeAssignment, openAssignment } from '@/lib/workflows/open-assignment';
import { overrideMarks, settleMarks, writeRemark } from '@/lib/workflows/override-marks';
import { releaseMarks } from '@/lib/workflows/release-marks';
import { setQuestions } from '@/lib/workflows/set-questions';
import { startSubmission } from '@/lib/workflows/start-submission';
import { actorOf, daysAgo, must } from './actors';
import { type Answers, HYMN_ANSWERS, HYMN_ASKED, STAIRCASE_ANSWERS } from './answers';
import type { SeededExcerpt } from './library';
import { COURSES, type SeededCourse } from './people';
import { numeralOf } from './reading-text';

interface Plan {
  readonly by: string;
  readonly course: SeededCourse;
  readonly excerpt: SeededExcerpt;
  readonly readingId: string;
  readonly title: string;
  readonly instructions: string;
  /** Places of the asked labels in the key; all when left out. */
  readonly asked?: readonly number[];
  readonly dueInDays: number | null;
}

interface Prepared {
  readonly assignmentId: string;
  readonly keyReadingId: string;
}

async function prepare(deps: Deps, plan: Plan): Promise<Prepared> {
  const { by, course, excerpt, readingId, title, instructions, dueInDays } = plan;
  const actor = actorOf(by);
  const { assignmentId } = must(await createAssignment(deps, actor, { courseId: course.id, title, readingId, excerptId: excerpt.excerptId }));
  const dueAt = dueInDays === null ? null : atFive(new Date(deps.now().getTime() + dueInDays * 86_400_000));
  await deps.db.update(assignments).set({ instructions, dueAt, showKeyAfterRelease: true }).where(eq(assignments.id, assignmentId));
  const [row] = await deps.db.select({ key: assignments.keyReadingId }).from(assignments).where(eq(assignments.id, assignmentId));
  if (!row) throw new Error('the assignment was not kept');
  if (plan.asked) await ask(deps, plan, assignmentId, row.key);
  return { assignmentId, keyReadingId: row.key };
}

/** The afternoon of that day: nobody sets work for 13:21. */
function atFive(day: Date): Date {
  return new Date(Date.UTC(day.getUTCFullYear(), day.getUTCMonth(), day.getUTCDate(), 17));
}

async function ask(deps: Deps, plan: Plan, assignmentId: string, keyReadingId: string): Promise<void> {
  const key = await contentOf(deps, keyReadingId);
  const questions = (plan.asked ?? []).flatMap((place) => {
    const label = key.labels[place];
    return label ? [{ startTick: label.start, points: null }] : [];
  });
  must(await setQuestions(deps, actorOf(plan.by), { assignmentId, questions }));
}

async function contentOf(deps: Deps, readingId: string) {
  const [span] = await deps.db
    .select({ startTick: readings.startTick, endTick: readings.endTick })
    .from(readings)
    .where(eq(readings.id, readingId));
  if (!span) throw new Error('the reading is gone');
  return unsafeLoadReadingContent(deps.db, { id: readingId, ...span });
}

/** Each student fills in the key's labels with their own differences, and hands in. */
async function handInAll(deps: Deps, { assignmentId, keyReadingId }: Prepared, answers: Answers): Promise<void> {
  const key = await contentOf(deps, keyReadingId);
  let minutes = 0;
  for (const [mailbox, differences] of Object.entries(answers)) {
    const then: Deps = { ...deps, now: () => new Date(deps.now().getTime() + (minutes += 17) * 1_000) };
    const actor = actorOf(mailbox);
    const { submissionId } = must(await startSubmission(then, actor, { assignmentId }));
    const submission = await findOwnSubmission(deps.db, actor, submissionId);
    if (!submission) throw new Error('the submission was not kept');
    const blank = await contentOf(deps, submission.readingId);
    const labels = blank.labels.map((label, place) => {
      if (label.numeral) return label;
      const typed = differences[place];
      const numeral = typed === undefined ? (key.labels[place]?.numeral ?? null) : typed === '' ? null : numeralOf(typed, label.key);
      return { ...label, numeral, state: 'changed' as const };
    });
    await deleteReadingContent(deps.db, submission.readingId);
    await insertReadingContent(deps.db, submission.readingId, { ...blank, labels });
    must(await handIn(then, actor, { submissionId, version: submission.readingVersion }));
  }
}

/** Handed in by eight, partly marked: what an instructor finds on a Monday. */
export async function seedHymnAssignment(deps: Deps, excerpt: SeededExcerpt, readingId: string): Promise<void> {
  const by = 't.wrenfield';
  const prepared = await prepare(daysAgo(deps, 9), {
    by,
    course: COURSES.chromatic,
    excerpt,
    readingId,
    title: 'Evening Hymn: where do the sevenths go?',
    instructions: 'Name every asked chord. For each leading-tone seventh, decide its quality by what it leads to before you write it.',
    asked: HYMN_ASKED,
    dueInDays: 11,
  });
  must(await openAssignment(daysAgo(deps, 9), actorOf(by), prepared));
  await handInAll(daysAgo(deps, 1), prepared, HYMN_ANSWERS);
  await markSome(deps, prepared, by);
}

async function markSome(deps: Deps, { assignmentId, keyReadingId }: Prepared, by: string): Promise<void> {
  const actor = actorOf(by);
  const key = await contentOf(deps, keyReadingId);
  const submissions = await listSubmissions(deps.db, actor, assignmentId);
  const first = key.labels[5];
  if (!first) throw new Error('the key is shorter than expected');
  const wrote = (mailbox: string) => submissions.filter((each) => each.studentId === actorOf(mailbox).userId).map(({ id }) => id);
  const answer = { assignmentId, startTick: first.start, submissionIds: [...wrote('c.pettibrand'), ...wrote('i.merridown')] };
  must(await writeRemark(deps, actor, { ...answer, remark: 'V is a major triad here and the seventh is E, not E♭: half-diminished.' }));
  must(await overrideMarks(deps, actor, { ...answer, submissionIds: wrote('g.ashbeck'), points: 1, verdict: 'partly' }));
  const answers = [1, 4, 5].flatMap((place) => {
    const label = key.labels[place];
    return label ? [{ startTick: label.start, submissionIds: submissions.map(({ id }) => id) }] : [];
  });
  must(await settleMarks(deps, actor, { assignmentId, answers, settled: true }));
}

/** Last week's: closed, marked, released. */
export async function seedStaircaseAssignment(deps: Deps, excerpt: SeededExcerpt, readingId: string): Promise<void> {
  const by = 't.wrenfield';
  const actor = actorOf(by);
  const prepared = await prepare(daysAgo(deps, 16), {
    by,
    course: COURSES.chromatic,
    excerpt,
    readingId,
    title: 'Staircase: one step at a time',
    instructions: 'Give the numeral of every chord. Each step of the bass is reached by its own leading tone.',
    dueInDays: 7,
  });
  must(await openAssignment(daysAgo(deps, 16), actor, prepared));
  await handInAll(daysAgo(deps, 10), prepared, STAIRCASE_ANSWERS);
  must(await closeAssignment(daysAgo(deps, 8), actor, prepared));
  const { assignmentId, keyReadingId } = prepared;
  const submissionIds = (await listSubmissions(deps.db, actor, assignmentId)).map(({ id }) => id);
  const answers = (await contentOf(deps, keyReadingId)).labels.map(({ start }) => ({ startTick: start, submissionIds }));
  must(await settleMarks(daysAgo(deps, 7), actor, { assignmentId, answers, settled: true }));
  must(await releaseMarks(daysAgo(deps, 7), actor, { assignmentId, submissionIds }));
}

/** One to do in the first-year course, one draft in the seminar. */
export async function seedOtherAssignments(deps: Deps, prelude: { excerpt: SeededExcerpt; readingId: string }, song: { excerpt: SeededExcerpt; readingId: string }): Promise<void> {
  const open = await prepare(daysAgo(deps, 2), {
    by: 'i.rookhope',
    course: COURSES.diatonic,
    ...prelude,
    title: 'A prelude, one chord a bar',
    instructions: 'One label a bar. Listen for the bass first, then for the seventh.',
    dueInDays: 8,
  });
  must(await openAssignment(daysAgo(deps, 2), actorOf('i.rookhope'), open));
  await prepare(deps, {
    by: 'b.ollershaw',
    course: COURSES.songs,
    ...song,
    title: 'Common-tone or leading-tone?',
    instructions: '',
    dueInDays: null,
  });
}
