import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findReading } from '@/db/queries/readings';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { assignments, questions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canPrepareAssignments } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { DEFAULT_RUBRIC } from '@/lib/marking/rubric';
import { type Result, err, ok } from '@/lib/result';
import type { createAssignmentInput } from './assignment-input';
import { findCourseFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { makeAnswerKey } from './start-reading';

type CreateInput = z.output<typeof createAssignmentInput>;

/** A draft that asks every label of its key. */
export async function createAssignment(
  deps: Deps,
  actor: Actor,
  input: CreateInput,
): Promise<Result<{ readonly assignmentId: string; readonly courseId: string }, AppError>> {
  const course = await findCourseFor(deps, actor, input.courseId, canPrepareAssignments);
  if (!course.ok) return course;
  return inTransaction(deps, async (inside) => {
    const keyReadingId = await findOrMakeKey(inside, actor, input);
    if (!keyReadingId.ok) return keyReadingId;
    const assignmentId = await insertAssignment(inside, actor, input, keyReadingId.value);
    await askEveryLabel(inside, actor, assignmentId, keyReadingId.value);
    await noteAudit(inside, actor, { verb: 'assignments.create', subjectKind: 'assignment', subjectId: assignmentId });
    return ok({ assignmentId, courseId: input.courseId });
  });
}

async function findOrMakeKey(deps: Deps, actor: Actor, input: CreateInput): Promise<Result<string, AppError>> {
  const source = await findReading(deps.db, actor, input.readingId, deps.now());
  if (!source || source.kind === 'submission' || source.excerptId !== input.excerptId) return err(appError('not_found'));
  if (source.kind === 'key') return ok(source.id);
  const made = await makeAnswerKey(deps, actor, { excerptId: source.excerptId, basedOn: source.id, title: `Key: ${input.title}`.slice(0, 300) });
  return made.ok ? ok(made.value.readingId) : made;
}

async function insertAssignment(deps: Deps, actor: Actor, input: CreateInput, keyReadingId: string): Promise<string> {
  const id = deps.newId();
  const { pointsPerLabel, ...rubric } = DEFAULT_RUBRIC;
  await deps.db.insert(assignments).values({
    id,
    courseId: input.courseId,
    excerptId: input.excerptId,
    keyReadingId,
    title: input.title,
    instructions: '',
    rubric,
    pointsPerLabel,
    createdBy: actor.userId,
    createdAt: deps.now(),
  });
  return id;
}

async function askEveryLabel(deps: Deps, actor: Actor, assignmentId: string, keyReadingId: string): Promise<void> {
  const key = await findReading(deps.db, actor, keyReadingId, deps.now());
  if (!key) throw new Error('the key was found or made just now');
  const { labels } = await unsafeLoadReadingContent(deps.db, key);
  const rows = labels
    .filter((label) => label.numeral)
    .map((label) => ({ id: deps.newId(), assignmentId, startTick: label.start, points: null }));
  if (rows.length > 0) await deps.db.insert(questions).values(rows);
}
