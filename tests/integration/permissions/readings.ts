import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { assignments, remarks, submissions } from '@/db/schema';
import type { Deps } from '@/lib/workflows/deps';
import { framedFrom } from '../../support/reading-notation';
import type { World } from '../../support/world';
import { type Case, type Cases, type Row, STAFF, visitorOf, may } from './matrix';

const TONIC = framedFrom('C: I').numeral;

type Which = (world: World) => string;

const engine: Which = (world) => world.engineReadingId;
const own: Which = (world) => world.privateReadingId;
const discussed: Which = (world) => world.discussedReadingId;
const shared: Which = (world) => world.sharedReadingId;
const key: Which = (world) => world.keyReadingId;

/** Of one's own department's staff, whoever may write in a shared reading: the owner comments. */
const WRITERS = may('assistant', 'otherInstructor', 'instructor');
/** A key is seen by every instructor and by the assistants of its courses, and written by those who prepare or own it. */
const KEY_READERS = STAFF;
const KEY_WRITERS = may('assistant', 'instructor', 'owner');
/** A student's work: the student, and who marks in the course. */
const WORK_READERS = may('student', 'assistant', 'instructor', 'owner');

/** The same try on each kind of reading. */
function onEach(name: string, input: (which: Which) => Case['input'], rows: Readonly<Record<'engine' | 'own' | 'discussed' | 'shared' | 'key', Row>>): Cases {
  return {
    [name]: { input: input(engine), expected: rows.engine },
    [`${name} (private)`]: { input: input(own), expected: rows.own },
    [`${name} (to comment)`]: { input: input(discussed), expected: rows.discussed },
    [`${name} (to edit)`]: { input: input(shared), expected: rows.shared },
    [`${name} (key)`]: { input: input(key), expected: rows.key },
  };
}

const SEEN = { engine: STAFF, own: may('instructor'), discussed: STAFF, shared: STAFF, key: KEY_READERS };
const EDITED = { engine: may(), own: may('instructor'), discussed: may('instructor'), shared: WRITERS, key: KEY_WRITERS };

const reads = (which: Which): Case['input'] => (world) => ({ readingId: which(world), since: 0 });

async function readingOfWork(world: World, deps: Deps): Promise<string> {
  const [row] = await deps.db.select({ readingId: submissions.readingId }).from(submissions).where(eq(submissions.id, world.submissionId));
  return row?.readingId ?? '';
}

const readsWork: Case['input'] = async (world, deps) => ({ readingId: await readingOfWork(world, deps), since: 0 });

/** Names the first label I. */
const namesFirst = (find: (world: World, deps: Deps) => Promise<string>): Case['input'] => async (world, deps) => {
  const readingId = await find(world, deps);
  const { labels } = await unsafeLoadReadingContent(deps.db, { id: readingId, startTick: 0, endTick: 8 });
  const [first] = labels;
  const regions = { before: [], after: [] };
  const change = { labels: { before: [first], after: [{ ...first, numeral: TONIC, state: 'changed' }] }, regions };
  return { readingId, editId: randomUUID(), baseVersion: 0, words: 'I', change };
};

const edits = (which: Which) => namesFirst(async (world) => which(world));

const remarksOn = (which: Which): Case['input'] => (world) => ({ readingId: which(world), body: 'A remark' });

/** A remark of one's own on the discussed reading, to be changed. */
const ownRemark: Case['input'] = async (world, deps, column) => {
  const author = visitorOf(world, column).actor?.userId ?? world.instructor.userId;
  await deps.db.update(remarks).set({ authorId: author }).where(eq(remarks.id, world.remarkId));
  return { readingId: world.discussedReadingId, remarkId: world.remarkId };
};

const ofInstructor: Case['input'] = (world) => ({ readingId: world.discussedReadingId, remarkId: world.remarkId });
const withBody = (input: Case['input']): Case['input'] => async (...from) => ({ ...((await input(...from)) as object), body: 'Reworded' });

/** The student has the marks back, and the assignment shows its key then. */
async function showKey(world: World, deps: Deps): Promise<void> {
  await deps.db.update(assignments).set({ showKeyAfterRelease: true }).where(eq(assignments.id, world.handedAssignmentId));
  await deps.db.update(submissions).set({ state: 'released' }).where(eq(submissions.id, world.handedSubmissionId));
}

export const readingCases: Cases = {
  ...onEach('readings.read', reads, SEEN),
  ...onEach('readings.news', reads, SEEN),
  ...onEach('readings.score', reads, SEEN),
  ...onEach('readings.download', (which) => (world) => ({ readingId: which(world), form: 'musicxml' }), SEEN),
  ...onEach('readings.edit', edits, EDITED),
  ...onEach('readings.revisions', reads, EDITED),
  ...onEach('remarks.list', reads, SEEN),
  ...onEach('remarks.people', reads, SEEN),
  ...onEach('remarks.add', remarksOn, SEEN),
  'readings.read (work)': { input: readsWork, expected: WORK_READERS },
  'readings.score (work)': { input: readsWork, expected: WORK_READERS },
  'readings.download (work)': {
    input: async (world, deps) => ({ readingId: await readingOfWork(world, deps), form: 'csv' }),
    expected: may('assistant', 'instructor', 'owner'),
  },
  'readings.edit (work)': { input: namesFirst(readingOfWork), expected: may('student') },
  'readings.revisions (work)': { input: readsWork, expected: may('student') },
  'remarks.people (work)': { input: readsWork, expected: WORK_READERS },
  'remarks.list (work)': { input: readsWork, expected: WORK_READERS },
  'readings.read (key that is shown)': {
    input: async (world, deps) => {
      await showKey(world, deps);
      return { readingId: world.keyReadingId };
    },
    expected: may('student', 'assistant', 'otherInstructor', 'instructor', 'owner'),
  },
  'remarks.change': { input: withBody(ownRemark), expected: STAFF },
  'remarks.change (of another)': { input: withBody(ofInstructor), expected: may('instructor') },
  'remarks.takeBack': { input: ownRemark, expected: STAFF },
  'remarks.takeBack (of another)': { input: ofInstructor, expected: may('instructor') },
};
