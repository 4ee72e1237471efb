import { randomUUID } from 'node:crypto';
import { insertReading, insertReadingContent } from '@/db/queries/reading-rows';
import type { Actor } from '@/lib/auth/actor';
import { setNumeral } from '@/lib/harmony/edit';
import { unwrap } from '@/lib/result';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { createAssignment } from '@/lib/workflows/create-assignment';
import type { Deps } from '@/lib/workflows/deps';
import { editReading } from '@/lib/workflows/edit-reading';
import { openAssignment } from '@/lib/workflows/open-assignment';
import { readReading } from '@/lib/workflows/read-reading';
import { startSubmission } from '@/lib/workflows/start-submission';
import { findOwnSubmission } from '@/db/queries/submissions';
import { readingFrom } from '../../support/reading-notation';
import { addCourse, addDepartment, addExcerpt, addPerson, addScore } from '../../support/world';

/** Four half-bar labels over the two bars of the tests' score. */
export const KEY = 'C: Cad64*0.5 V7*0.5 V65/V*0.5 ii6*0.5';

export interface CourseWorld {
  readonly departmentId: string;
  readonly courseId: string;
  readonly excerptId: string;
  readonly instructor: Actor;
  readonly assistant: Actor;
  readonly students: readonly [Actor, Actor, Actor];
  readonly outsider: Actor;
}

export async function createCourseWorld(deps: Deps): Promise<CourseWorld> {
  const departmentId = await addDepartment(deps, 'Course tests');
  const here = (role: Actor['role'], mailbox: string) => addPerson(deps, departmentId, role, mailbox);
  const instructor = await here('instructor', 'teaches');
  const assistant = await here('assistant', 'helps');
  const students = [await here('student', 'ada'), await here('student', 'ben'), await here('student', 'cleo')] as const;
  const outsider = await here('student', 'outsider');
  const courseId = await addCourse(deps, departmentId, `CW-${departmentId.slice(0, 8).toUpperCase()}`, [
    [instructor, 'instructor'],
    [assistant, 'assistant'],
    ...students.map((student) => [student, 'student'] as const),
  ]);
  const excerptId = await addExcerpt(deps, instructor, await addScore(deps, instructor));
  return { departmentId, courseId, excerptId, instructor, assistant, students: [...students], outsider };
}

/** A reading of the excerpt in the tests' notation, the instructor's own. */
export async function addNotedReading(deps: Deps, world: CourseWorld, notation: string, kind: 'person' | 'key' = 'person'): Promise<string> {
  const id = deps.newId();
  const content = readingFrom(notation);
  await insertReading(deps.db, {
    id, excerptId: world.excerptId, departmentId: world.departmentId, ownerId: world.instructor.userId, kind, title: 'Reading', state: 'open', startTick: content.start, endTick: content.end,
  });
  await insertReadingContent(deps.db, id, { ...content, labels: content.labels.map((label) => ({ ...label, id: randomUUID() })) });
  return id;
}

/** An open assignment that asks every label of KEY. */
export async function addOpenAssignment(deps: Deps, world: CourseWorld): Promise<string> {
  const readingId = await addNotedReading(deps, world, KEY);
  const { instructor, courseId, excerptId } = world;
  const { assignmentId } = unwrap(await createAssignment(deps, instructor, { courseId, title: 'Cadences', readingId, excerptId }));
  unwrap(await openAssignment(deps, instructor, { assignmentId }));
  return assignmentId;
}

/** Begins, writes these numerals in order (`_` leaves a blank) through the desk's own edits, and says what to hand in. */
export async function writeAnswer(deps: Deps, student: Actor, assignmentId: string, numerals: string): Promise<{ readonly submissionId: string; readonly version: number }> {
  const { submissionId } = unwrap(await startSubmission(deps, student, { assignmentId }));
  const submission = await findOwnSubmission(deps.db, student, submissionId);
  if (!submission) throw new Error('just begun');
  const { readingId } = submission;
  for (const [place, text] of numerals.split(' ').entries()) {
    if (text === '_') continue;
    const { reading, version } = unwrap(await readReading(deps, student, { readingId }));
    const label = reading.labels[place];
    if (!label) throw new Error(`no span ${place}`);
    const { change } = unwrap(setNumeral(reading, label.id, unwrap(parseNumeral(text, label.key.mode))));
    unwrap(await editReading(deps, student, { readingId, editId: randomUUID(), baseVersion: version, words: 'Written.', change }));
  }
  const { version } = unwrap(await readReading(deps, student, { readingId }));
  return { submissionId, version };
}
