import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { Assignment } from '@/db/queries/assignments';
import { noteAudit } from '@/db/queries/audit';
import { lockReading } from '@/db/queries/readings';
import { type Submission, findOwnSubmission, listSubmissions } from '@/db/queries/submissions';
import { submissions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canHandIn, canRunCourse } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { assignmentInput } from './assignment-input';
import { findAssignmentFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { unsafeGetKey } from './key-of-assignment';
import { compareSubmission, refreshSubmissions, saveProposedMarks } from './propose-marks';
import { refusalAt } from './start-submission';
import type { handInInput } from './submission-input';

/** Hands the attempt in: from here on it is read-only, and compared with the key at once. */
export async function handIn(
  deps: Deps,
  actor: Actor,
  { submissionId, version }: z.output<typeof handInInput>,
): Promise<Result<{ readonly submissionId: string; readonly assignmentId: string }, AppError>> {
  return inTransaction(deps, async (inside) => {
    const readingId = (await findOwnSubmission(inside.db, actor, submissionId))?.readingId;
    if (!readingId || !(await lockReading(inside.db, actor, readingId))) return err(appError('not_found'));
    // Read again under the lock: an edit or another tab's hand-in may have come between.
    const submission = await findOwnSubmission(inside.db, actor, submissionId);
    if (!submission) return err(appError('not_found'));
    const found = await findAssignmentFor(inside, actor, submission.assignmentId, canHandIn);
    if (!found.ok) return found;
    const refused = refusalOf(found.value, submission, version, inside.now());
    if (refused) return err(refused);
    await take(inside, found.value, [submission]);
    await noteAudit(inside, actor, { verb: 'submissions.hand-in', subjectKind: 'submission', subjectId: submissionId });
    return ok({ submissionId, assignmentId: submission.assignmentId });
  });
}

function refusalOf(assignment: Assignment, submission: Submission, version: number, now: Date): AppError | null {
  if (submission.state !== 'working') return appError('already_handed_in');
  if (submission.readingVersion !== version) {
    return appError('version_conflict', 'The page and the server do not hold the same work. Reload the page, look at it, and hand in again.');
  }
  return refusalAt(assignment, now, 0);
}

/** Turns attempts into handed-in ones with proposed marks. */
async function take(deps: Deps, assignment: Assignment, attempts: readonly Submission[]): Promise<void> {
  const { key } = await unsafeGetKey(deps, assignment.id);
  for (const attempt of attempts) {
    await deps.db.update(submissions).set({ state: 'handed_in', handedInAt: deps.now() }).where(and(eq(submissions.id, attempt.id), eq(submissions.state, 'working')));
    await saveProposedMarks(deps, attempt.id, await compareSubmission(deps, assignment, key, attempt));
    await refreshSubmissions(deps, [attempt.id]);
  }
}

/** When an assignment is closed: takes what students had begun and not handed in, as it stands. */
export async function collectSubmissions(
  deps: Deps,
  actor: Actor,
  { assignmentId }: z.output<typeof assignmentInput>,
): Promise<Result<{ readonly assignmentId: string; readonly collected: number }, AppError>> {
  const found = await findAssignmentFor(deps, actor, assignmentId, canRunCourse);
  if (!found.ok) return found;
  const assignment = found.value;
  const isOver = assignment.state === 'closed' || (assignment.closesAt !== null && assignment.closesAt <= deps.now());
  if (!isOver) return err(appError('not_ready', 'Close the assignment first: students are still at work.'));
  return inTransaction(deps, async (inside) => {
    const working = (await listSubmissions(inside.db, actor, assignmentId)).filter((one) => one.state === 'working');
    for (const submission of working) await lockReading(inside.db, actor, submission.readingId);
    await take(inside, assignment, working);
    await noteAudit(inside, actor, { verb: 'submissions.collect', subjectKind: 'assignment', subjectId: assignmentId, details: { count: working.length } });
    return ok({ assignmentId, collected: working.length });
  });
}
