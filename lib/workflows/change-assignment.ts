import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import { type Assignment, hasSubmissions } from '@/db/queries/assignments';
import { noteAudit } from '@/db/queries/audit';
import { assignments } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canPrepareAssignments, canRunCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { checkRubric } from '@/lib/marking/rubric';
import { type Result, err, ok } from '@/lib/result';
import type { changeAssignmentInput } from './assignment-input';
import { findAssignmentFor } from './course-access';
import type { Deps } from './deps';

type ChangeInput = z.output<typeof changeAssignmentInput>;

/**
 * Changes an assignment's words, dates, rubric and form. Drafts are for whoever prepares; once it is open only those who
 * run the course change it, and its form stays as it is as soon as someone has begun.
 */
export async function changeAssignment(
  deps: Deps,
  actor: Actor,
  input: ChangeInput,
): Promise<Result<{ readonly assignmentId: string }, AppError>> {
  const assignment = await findEditable(deps, actor, input.assignmentId);
  if (!assignment.ok) return assignment;
  const wrong = await findFault(deps, assignment.value, input);
  if (wrong) return err(wrong);
  const { assignmentId, rubric, ...fields } = input;
  const { pointsPerLabel, ...rest } = rubric;
  await deps.db.update(assignments).set({ ...fields, rubric: rest, pointsPerLabel }).where(eq(assignments.id, assignmentId));
  await noteAudit(deps, actor, { verb: 'assignments.change', subjectKind: 'assignment', subjectId: assignmentId });
  return ok({ assignmentId });
}

/** An assignment that the actor may change in its present state. */
export function findEditable(deps: Deps, actor: Actor, assignmentId: string): Promise<Result<Assignment, AppError>> {
  return findAssignmentFor(deps, actor, assignmentId, canPrepareAssignments).then((found) =>
    found.ok && found.value.state !== 'draft' && !canRunCourse(actor, found.value.courseRole) ? err(appError('not_found')) : found,
  );
}

async function findFault(deps: Deps, assignment: Assignment, input: ChangeInput): Promise<AppError | null> {
  const order = wrongOrder(input);
  if (order) return appError('bad_input', undefined, order);
  const [rubric] = checkRubric(input.rubric);
  if (rubric) return appError('bad_input', rubric, { rubric });
  const form = ['segmentation', 'keysGiven', 'othersGiven'] as const;
  const isReformed = form.some((field) => assignment[field] !== input[field]);
  return isReformed && (await hasSubmissions(deps.db, assignment.id)) ? FORM_FIXED : null;
}

const FORM_FIXED = appError(
  'in_use',
  'Students have begun: what is asked and how can no longer change. Dates, rubric, alternatives and words can.',
);

function wrongOrder({ opensAt, dueAt, closesAt }: Pick<ChangeInput, 'opensAt' | 'dueAt' | 'closesAt'>): Record<string, string> | null {
  if (opensAt && dueAt && dueAt <= opensAt) return { dueAt: 'This is due before it opens.' };
  if (closesAt && dueAt && closesAt < dueAt) return { closesAt: 'This closes before it is due.' };
  if (closesAt && opensAt && closesAt <= opensAt) return { closesAt: 'This closes before it opens.' };
  return null;
}
