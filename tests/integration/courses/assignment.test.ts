import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { findAssignment, listAssignments, unsafeGetKeyRow, unsafeListQuestions } from '@/db/queries/assignments';
import { listUsedRemarks, unsafeListMarks } from '@/db/queries/marks';
import { findReading } from '@/db/queries/readings';
import { findOwnSubmission, findSubmissionToMark, listOwnWork } from '@/db/queries/submissions';
import { assignments, auditEvents, outbox } from '@/db/schema';
import { DEFAULT_RUBRIC } from '@/lib/marking/rubric';
import { unwrap } from '@/lib/result';
import { changeAssignment } from '@/lib/workflows/change-assignment';
import { editReading } from '@/lib/workflows/edit-reading';
import { collectSubmissions, handIn } from '@/lib/workflows/hand-in';
import { findMarkChanges, markAgain } from '@/lib/workflows/mark-again';
import { closeAssignment, deleteAssignment, openAssignment } from '@/lib/workflows/open-assignment';
import { overrideMarks, settleMarks, writeRemark } from '@/lib/workflows/override-marks';
import { readReading } from '@/lib/workflows/read-reading';
import { releaseMarks } from '@/lib/workflows/release-marks';
import { acceptAlternative, setQuestions } from '@/lib/workflows/set-questions';
import { startSubmission } from '@/lib/workflows/start-submission';
import { framedFrom } from '../../support/reading-notation';
import { type TestServices, openServices } from '../../support/services';
import { type CourseWorld, addOpenAssignment, createCourseWorld, writeAnswer } from './course-world';

let services: TestServices;
let world: CourseWorld;
let assignmentId: string;

beforeAll(async () => {
  services = await openServices();
});
afterAll(() => services.close());
beforeEach(async () => {
  world = await createCourseWorld(services.deps);
  assignmentId = await addOpenAssignment(services.deps, world);
});

const deps = () => services.deps;
const settings = () => ({
  assignmentId, title: 'Cadences', instructions: '', segmentation: 'given' as const, keysGiven: true, othersGiven: true, rubric: DEFAULT_RUBRIC,
  opensAt: null, dueAt: null, closesAt: null, attempts: 1, showKeyAfterRelease: false,
});

async function hand(place: 0 | 1 | 2, numerals: string): Promise<string> {
  const written = await writeAnswer(deps(), world.students[place], assignmentId, numerals);
  return unwrap(await handIn(deps(), world.students[place], written)).submissionId;
}

async function pointsOf(submissionId: string): Promise<number[]> {
  return (await unsafeListMarks(deps().db, [submissionId])).map((mark) => mark.points);
}

describe('createAssignment', () => {
  it('makes a key of a reading and asks every label', async () => {
    expect((await unsafeGetKeyRow(deps().db, assignmentId)).kind).toBe('key');
    expect((await unsafeListQuestions(deps().db, assignmentId)).map((q) => q.startTick)).toEqual([0, 2, 4, 6]);
  });

  it('refuses to open when nothing is asked', async () => {
    unwrap(await setQuestions(deps(), world.instructor, { assignmentId, questions: [] }));
    unwrap(await closeAssignment(deps(), world.instructor, { assignmentId }));
    expect(await openAssignment(deps(), world.instructor, { assignmentId })).toMatchObject({ ok: false, error: { code: 'bad_input' } });
  });
});

describe('startSubmission', () => {
  it('gives the spans and none of the key’s numerals', async () => {
    const [student] = world.students;
    const { submissionId } = unwrap(await startSubmission(deps(), student, { assignmentId }));
    const { readingId } = (await findOwnSubmission(deps().db, student, submissionId))!;
    const { reading } = unwrap(await readReading(deps(), student, { readingId }));
    expect(reading.labels.map((label) => [label.start, label.numeral, label.others.length])).toEqual([[0, null, 0], [2, null, 0], [4, null, 0], [6, null, 0]]);
  });

  it('prints what is not asked when the assignment says so, and only then', async () => {
    unwrap(await setQuestions(deps(), world.instructor, { assignmentId, questions: [{ startTick: 4, points: null }] }));
    const given = async (place: 0 | 1) => {
      const student = world.students[place];
      const { submissionId } = unwrap(await startSubmission(deps(), student, { assignmentId }));
      const { readingId } = (await findOwnSubmission(deps().db, student, submissionId))!;
      return unwrap(await readReading(deps(), student, { readingId })).reading.labels.map((label) => label.numeral !== null);
    };
    expect(await given(0)).toEqual([true, true, false, true]);
    await deps().db.update(assignments).set({ othersGiven: false }).where(eq(assignments.id, assignmentId));
    expect(await given(1)).toEqual([false, false, false, false]);
  });

  it('starts from one span a bar in one key when spans and keys are asked', async () => {
    unwrap(await changeAssignment(deps(), world.instructor, { ...settings(), segmentation: 'open', keysGiven: false }));
    const [student] = world.students;
    const { submissionId } = unwrap(await startSubmission(deps(), student, { assignmentId }));
    const { readingId } = (await findOwnSubmission(deps().db, student, submissionId))!;
    const { reading } = unwrap(await readReading(deps(), student, { readingId }));
    expect(reading.labels.map((label) => [label.start, label.end, label.numeral])).toEqual([[0, 4, null], [4, 8, null]]);
  });

  it('opens the attempt under way again, from two tabs as well', async () => {
    const [student] = world.students;
    const both = await Promise.all([startSubmission(deps(), student, { assignmentId }), startSubmission(deps(), student, { assignmentId })]);
    expect(new Set(both.map((one) => unwrap(one).submissionId)).size).toBe(1);
  });

  it('keeps to the dates and to the attempts', async () => {
    const [student] = world.students;
    const now = deps().now().getTime();
    const hour = (n: number) => new Date(now + n * 3_600_000);
    unwrap(await changeAssignment(deps(), world.instructor, { ...settings(), opensAt: hour(1), closesAt: hour(3) }));
    expect(await startSubmission(deps(), student, { assignmentId })).toMatchObject({ ok: false, error: { code: 'submission_closed' } });
    services.clock.forward(2 * 3_600_000);
    const { submissionId } = unwrap(await startSubmission(deps(), student, { assignmentId }));
    unwrap(await handIn(deps(), student, { submissionId, version: 0 }));
    expect(await startSubmission(deps(), student, { assignmentId })).toMatchObject({ ok: false, error: { code: 'already_handed_in' } });
    services.clock.forward(2 * 3_600_000);
    expect(await startSubmission(deps(), world.students[1], { assignmentId })).toMatchObject({ ok: false, error: { code: 'submission_closed' } });
  });

  it('carries the work of the last attempt into the next', async () => {
    unwrap(await changeAssignment(deps(), world.instructor, { ...settings(), attempts: 2 }));
    await hand(0, 'Cad64 V7 _ _');
    const again = await writeAnswer(deps(), world.students[0], assignmentId, '_ _ V65/V _');
    const second = unwrap(await handIn(deps(), world.students[0], again));
    expect(await pointsOf(second.submissionId)).toEqual([2, 2, 2, 0]);
  });
});

describe('handIn', () => {
  it('proposes a mark for every asked span at once', async () => {
    const submissionId = await hand(0, 'IV V V7/V _');
    const marks = await unsafeListMarks(deps().db, [submissionId]);
    expect(marks.map((mark) => mark.verdict)).toEqual(['not-this', 'partly', 'partly', 'blank']);
    expect((await findSubmissionToMark(deps().db, world.instructor, submissionId))?.maxPoints).toBe(8);
  });

  it('refuses work that the page has not saved, and a second time', async () => {
    const [student] = world.students;
    const { submissionId, version } = await writeAnswer(deps(), student, assignmentId, 'I V7 _ _');
    expect(await handIn(deps(), student, { submissionId, version: version - 1 })).toMatchObject({ ok: false, error: { code: 'version_conflict' } });
    unwrap(await handIn(deps(), student, { submissionId, version }));
    expect(await handIn(deps(), student, { submissionId, version })).toMatchObject({ ok: false, error: { code: 'already_handed_in' } });
  });

  it('ends writing: a late edit is refused', async () => {
    const [student] = world.students;
    const { submissionId, version } = await writeAnswer(deps(), student, assignmentId, 'I V7 _ _');
    unwrap(await handIn(deps(), student, { submissionId, version }));
    const { readingId } = (await findOwnSubmission(deps().db, student, submissionId))!;
    const change = { labels: { before: [], after: [] }, regions: { before: [], after: [] } };
    const late = await editReading(deps(), student, { readingId, editId: deps().newId(), baseVersion: version, words: 'Late.', change });
    expect(late.ok).toBe(false);
  });

  it('lets the instructor collect what was begun once it is closed', async () => {
    await writeAnswer(deps(), world.students[0], assignmentId, 'Cad64 V7 _ _');
    expect(await collectSubmissions(deps(), world.instructor, { assignmentId })).toMatchObject({ ok: false, error: { code: 'not_ready' } });
    unwrap(await closeAssignment(deps(), world.instructor, { assignmentId }));
    expect(unwrap(await collectSubmissions(deps(), world.instructor, { assignmentId })).collected).toBe(1);
  });

  it('fixes what is asked as soon as someone has begun', async () => {
    unwrap(await startSubmission(deps(), world.students[0], { assignmentId }));
    expect(await changeAssignment(deps(), world.instructor, { ...settings(), segmentation: 'open' })).toMatchObject({ ok: false, error: { code: 'in_use' } });
    expect(await setQuestions(deps(), world.instructor, { assignmentId, questions: [] })).toMatchObject({ ok: false, error: { code: 'in_use' } });
    expect(await deleteAssignment(deps(), world.instructor, { assignmentId })).toMatchObject({ ok: false, error: { code: 'in_use' } });
    expect((await changeAssignment(deps(), world.instructor, { ...settings(), title: 'Other words' })).ok).toBe(true);
  });
});

describe('marking', () => {
  it('overrides a whole group or one, takes the proposal again, and keeps remarks for reuse', async () => {
    const ada = await hand(0, 'Cad64 V V65/V ii6');
    const ben = await hand(1, 'Cad64 V V65/V ii6');
    const both = { assignmentId, startTick: 2, submissionIds: [ada, ben] };
    unwrap(await overrideMarks(deps(), world.assistant, { ...both, points: 2, verdict: 'alternative' }));
    unwrap(await overrideMarks(deps(), world.assistant, { ...both, submissionIds: [ben], points: 0.5, verdict: null }));
    unwrap(await writeRemark(deps(), world.assistant, { ...both, remark: 'Look at the tenor.' }));
    expect((await unsafeListMarks(deps().db, [ada, ben])).filter((m) => m.startTick === 2).map((m) => [m.points, m.remark, m.overridden])).toEqual(
      expect.arrayContaining([[2, 'Look at the tenor.', true], [0.5, 'Look at the tenor.', true]]),
    );
    expect(await listUsedRemarks(deps().db, world.assistant, world.courseId)).toEqual(['Look at the tenor.']);
    unwrap(await overrideMarks(deps(), world.assistant, { ...both, points: null, verdict: null }));
    expect(await pointsOf(ada)).toEqual(await pointsOf(ben));
  });

  it('refuses more than full marks, and submissions of another assignment', async () => {
    const ada = await hand(0, 'Cad64 V V65/V ii6');
    const other = await addOpenAssignment(deps(), world);
    const too = { assignmentId, startTick: 2, submissionIds: [ada], points: 3, verdict: null };
    expect(await overrideMarks(deps(), world.instructor, too)).toMatchObject({ ok: false, error: { code: 'bad_input' } });
    expect(await overrideMarks(deps(), world.instructor, { ...too, assignmentId: other, points: 1 })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });

  it('is done for a student when every answer was looked at', async () => {
    const ada = await hand(0, 'Cad64 V7 V65/V ii6');
    const answers = [0, 2, 4, 6].map((startTick) => ({ startTick, submissionIds: [ada] }));
    unwrap(await settleMarks(deps(), world.assistant, { assignmentId, answers: answers.slice(0, 3), settled: true }));
    expect((await findSubmissionToMark(deps().db, world.instructor, ada))?.state).toBe('handed_in');
    unwrap(await settleMarks(deps(), world.assistant, { assignmentId, answers, settled: true }));
    expect((await findSubmissionToMark(deps().db, world.instructor, ada))?.state).toBe('marked');
    unwrap(await settleMarks(deps(), world.assistant, { assignmentId, answers: answers.slice(0, 1), settled: false }));
    expect((await findSubmissionToMark(deps().db, world.instructor, ada))?.state).toBe('handed_in');
  });
});

describe('listAssignments', () => {
  it('counts the course’s own students and their work only', async () => {
    await addOpenAssignment(deps(), await createCourseWorld(deps()));
    const ada = await hand(0, 'Cad64 V7 _ _');
    await hand(1, 'Cad64 V7 _ _');
    await writeAnswer(deps(), world.students[2], assignmentId, 'Cad64');
    unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada] }));
    expect(await listAssignments(deps().db, world.instructor, world.courseId)).toMatchObject([{ students: 3, handedIn: 2, released: 1 }]);
  });
});

describe('releaseMarks', () => {
  it('shows the chosen students their marks and queues one mail each, without a mark in it', async () => {
    const ada = await hand(0, 'Cad64 V7 V65/V ii6');
    const ben = await hand(1, 'V V _ _');
    expect((await findOwnSubmission(deps().db, world.students[0], ada))?.points).toBeNull();
    unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada] }));
    expect(await findOwnSubmission(deps().db, world.students[0], ada)).toMatchObject({ state: 'released', points: 8, maxPoints: 8 });
    expect(await findOwnSubmission(deps().db, world.students[1], ben)).toMatchObject({ state: 'handed_in', points: null });
    const mails = await deps().db.select().from(outbox).where(eq(outbox.toAddress, world.students[0].email));
    expect(mails.map((mail) => mail.subject)).toEqual(['Your analysis has been marked: Cadences']);
    expect(mails[0]?.textBody).toContain(`/submissions/${ada}/feedback`);
    expect(mails[0]?.textBody).not.toMatch(/\d+ (?:of|points)/);
    const events = await deps().db.select().from(auditEvents).where(eq(auditEvents.subjectId, assignmentId));
    expect(events.filter((event) => event.verb === 'marks.release').map((event) => event.details)).toEqual([{ count: 1 }]);
  });

  it('is done once: a second release sends nothing', async () => {
    const ada = await hand(0, 'Cad64 V7 V65/V ii6');
    unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada] }));
    expect(unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada] })).released).toBe(0);
    expect(await deps().db.select().from(outbox).where(eq(outbox.toAddress, world.students[0].email))).toHaveLength(1);
  });

  it('is not for assistants, and not for an attempt that does not count', async () => {
    unwrap(await changeAssignment(deps(), world.instructor, { ...settings(), attempts: 2 }));
    const first = await hand(0, 'I V7 _ _');
    await hand(0, 'Cad64 _ _ _');
    expect(await releaseMarks(deps(), world.assistant, { assignmentId, submissionIds: [first] })).toMatchObject({ ok: false, error: { code: 'not_found' } });
    expect(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [first] })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});

describe('markAgain', () => {
  it('says what an accepted alternative changes before it changes anything, and tells who saw other marks', async () => {
    const ada = await hand(0, 'Cad64 V7 V65/V IV');
    const ben = await hand(1, 'Cad64 V7 V65/V ii6');
    unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada, ben] }));
    expect(unwrap(await findMarkChanges(deps(), world.instructor, assignmentId))).toEqual([]);
    unwrap(await acceptAlternative(deps(), world.instructor, { assignmentId, startTick: 6, chord: framedFrom('C: IV') }));
    const changes = unwrap(await findMarkChanges(deps(), world.instructor, assignmentId));
    expect(changes).toMatchObject([{ startTick: 6, studentName: world.students[0].name, before: { verdict: 'not-this' }, after: { verdict: 'alternative', points: 2 } }]);
    expect(await pointsOf(ada)).toEqual([2, 2, 2, 0]);
    unwrap(await markAgain(deps(), world.instructor, { assignmentId }));
    expect(await pointsOf(ada)).toEqual([2, 2, 2, 2]);
    expect((await findOwnSubmission(deps().db, world.students[0], ada))?.points).toBe(8);
    const subjects = async (place: 0 | 1) => (await deps().db.select().from(outbox).where(eq(outbox.toAddress, world.students[place].email))).map((mail) => mail.subject);
    expect(await subjects(0)).toContain('Your marks have changed: Cadences');
    expect(await subjects(1)).toHaveLength(1);
  });

  it('leaves what a person has changed', async () => {
    const ada = await hand(0, 'Cad64 V7 V65/V IV');
    unwrap(await overrideMarks(deps(), world.instructor, { assignmentId, startTick: 6, submissionIds: [ada], points: 0.5, verdict: null }));
    unwrap(await acceptAlternative(deps(), world.instructor, { assignmentId, startTick: 6, chord: framedFrom('C: IV') }));
    unwrap(await markAgain(deps(), world.instructor, { assignmentId }));
    expect(await pointsOf(ada)).toEqual([2, 2, 2, 0.5]);
  });
});

describe('what a student cannot reach', () => {
  it('is the key before release, and after it unless the assignment shows it', async () => {
    const [student] = world.students;
    const { id: keyId } = await unsafeGetKeyRow(deps().db, assignmentId);
    const seen = async () => (await findReading(deps().db, student, keyId, deps().now())) !== null;
    const ada = await hand(0, 'Cad64 V7 _ _');
    expect(await seen()).toBe(false);
    unwrap(await releaseMarks(deps(), world.instructor, { assignmentId, submissionIds: [ada] }));
    expect(await seen()).toBe(false);
    unwrap(await changeAssignment(deps(), world.instructor, { ...settings(), showKeyAfterRelease: true }));
    expect(await seen()).toBe(true);
    expect(await findReading(deps().db, world.students[1], keyId, deps().now())).toBeNull();
  });

  it('is a draft, a classmate’s work, and another course', async () => {
    await deps().db.update(assignments).set({ state: 'draft' }).where(eq(assignments.id, assignmentId));
    expect(await findAssignment(deps().db, world.students[0], assignmentId)).toBeNull();
    await deps().db.update(assignments).set({ state: 'open' }).where(eq(assignments.id, assignmentId));
    const ada = await hand(0, 'Cad64 V7 _ _');
    expect(await findOwnSubmission(deps().db, world.students[1], ada)).toBeNull();
    expect(await findSubmissionToMark(deps().db, world.students[1], ada)).toBeNull();
    expect(await findAssignment(deps().db, world.outsider, assignmentId)).toBeNull();
    expect(await listOwnWork(deps().db, world.outsider)).toEqual([]);
  });
});
