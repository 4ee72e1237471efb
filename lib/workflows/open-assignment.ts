import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import { type Assignment, hasSubmissions } from '@/db/queries/assignments';
import { noteAudit } from '@/db/queries/audit';
import { assignments } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canPrepareAssignments, canRunCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type KeyFinding, checkKey } from '@/lib/marking/check-key';
import { type Result, err, ok } from '@/lib/result';
import type { AssignmentState } from '@/lib/vocabularies';
import type { assignmentInput } from './assignment-input';
import { findAssignmentFor } from './course-access';
import type { Deps } from './deps';
import { unsafeGetKey } from './key-of-assignment';

type Input = z.output<typeof assignmentInput>;
type Changed = Result<{ readonly assignmentId: string; readonly courseId: string }, AppError>;

/** What stands in the way of opening, and what deserves a look. */
export async function unsafeCheckAssignment(deps: Deps, assignment: Assignment): Promise<KeyFinding[]> {
  const { key, reading } = await unsafeGetKey(deps, assignment.id);
  const unsure = reading.labels.filter((label) => label.state === 'suggested').map((label) => label.start);
  return checkKey(key, unsure);
}

/** Lets students in, from `opensAt` on or at once. */
export async function openAssignment(deps: Deps, actor: Actor, { assignmentId }: Input): Promise<Changed> {
  const assignment = await findAssignmentFor(deps, actor, assignmentId, canRunCourse);
  if (!assignment.ok) return assignment;
  const stops = (await unsafeCheckAssignment(deps, assignment.value)).filter((finding) => finding.severity === 'stop');
  if (stops.length > 0) return err(appError('bad_input', stops.map((finding) => finding.message).join(' ')));
  const { closesAt } = assignment.value;
  if (closesAt && closesAt <= deps.now()) return err(appError('bad_input', 'Its closing date is over. Set a later one first.'));
  return setState(deps, actor, assignment.value, 'open');
}

/** Takes no more work. What students have begun is kept; it can be collected. */
export async function closeAssignment(deps: Deps, actor: Actor, { assignmentId }: Input): Promise<Changed> {
  const assignment = await findAssignmentFor(deps, actor, assignmentId, canRunCourse);
  return assignment.ok ? setState(deps, actor, assignment.value, 'closed') : assignment;
}

async function setState(deps: Deps, actor: Actor, { id, courseId }: Assignment, state: AssignmentState): Promise<Changed> {
  await deps.db.update(assignments).set({ state }).where(eq(assignments.id, id));
  await noteAudit(deps, actor, { verb: `assignments.${state}`, subjectKind: 'assignment', subjectId: id });
  return ok({ assignmentId: id, courseId });
}

/** Deletes an assignment that nobody has begun. */
export async function deleteAssignment(deps: Deps, actor: Actor, { assignmentId }: Input): Promise<Changed> {
  const assignment = await findAssignmentFor(deps, actor, assignmentId, canPrepareAssignments);
  if (!assignment.ok) return assignment;
  const { courseRole, state, courseId } = assignment.value;
  if (state !== 'draft' && !canRunCourse(actor, courseRole)) return err(appError('not_found'));
  if (await hasSubmissions(deps.db, assignmentId)) {
    return err(appError('in_use', 'Students have begun this. Close it instead; their work stays.'));
  }
  await deps.db.update(assignments).set({ deletedAt: deps.now() }).where(eq(assignments.id, assignmentId));
  await noteAudit(deps, actor, { verb: 'assignments.delete', subjectKind: 'assignment', subjectId: assignmentId });
  return ok({ assignmentId, courseId });
}
