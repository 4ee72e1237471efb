import type { z } from 'zod';
import { isDuplicate } from '@/db/client';
import { type Assignment, unsafeGetKeySignature } from '@/db/queries/assignments';
import { insertReading, insertReadingContent, unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { type Submission, listOwnSubmissions } from '@/db/queries/submissions';
import { submissions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canHandIn } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { blankAnswer } from './blank-answer';
import { findAssignmentFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { unsafeGetKey } from './key-of-assignment';
import type { startSubmissionInput } from './submission-input';

type Started = Result<{ readonly submissionId: string }, AppError>;

/** Opens the student's desk: the attempt under way, or a new one while the assignment takes work and attempts are left. */
export async function startSubmission(deps: Deps, actor: Actor, { assignmentId }: z.output<typeof startSubmissionInput>): Promise<Started> {
  const found = await findAssignmentFor(deps, actor, assignmentId, canHandIn);
  if (!found.ok) return found;
  const assignment = found.value;
  const own = await listOwnSubmissions(deps.db, actor, assignmentId);
  const working = own.find((submission) => submission.state === 'working');
  if (working) return ok({ submissionId: working.id });
  const refused = refusalAt(assignment, deps.now(), own.length);
  if (refused) return err(refused);
  try {
    return ok({ submissionId: await inTransaction(deps, (inside) => begin(inside, actor, assignment, own.at(-1) ?? null)) });
  } catch (error) {
    // Two tabs began at once: the first one's attempt is the attempt.
    if (isDuplicate(error)) return startSubmission(deps, actor, { assignmentId });
    throw error;
  }
}

/** Why the assignment takes no work now; null when it does. */
export function refusalAt(assignment: Assignment, now: Date, attemptsUsed: number): AppError | null {
  const { state, opensAt, closesAt, attempts } = assignment;
  if (state === 'closed' || (closesAt && closesAt <= now)) return appError('submission_closed', 'This assignment is closed: it takes no more work.');
  if (opensAt && opensAt > now) return appError('submission_closed', 'This assignment is not open yet.');
  if (attemptsUsed >= attempts) return appError('already_handed_in', attempts === 1 ? undefined : `All ${attempts} attempts are used.`);
  return null;
}

async function begin(deps: Deps, actor: Actor, assignment: Assignment, last: Submission | null): Promise<string> {
  const { key } = await unsafeGetKey(deps, assignment.id);
  const readingId = deps.newId();
  const submissionId = deps.newId();
  const attempt = (last?.attempt ?? 0) + 1;
  await insertReading(deps.db, {
    id: readingId,
    excerptId: assignment.excerptId,
    departmentId: actor.departmentId,
    ownerId: actor.userId,
    kind: 'submission',
    title: assignment.title,
    state: 'open',
    startTick: key.start,
    endTick: key.end,
  });
  const content = last
    ? await unsafeLoadReadingContent(deps.db, { id: last.readingId, startTick: last.startTick, endTick: last.endTick })
    : blankAnswer(assignment, key, await unsafeGetKeySignature(deps.db, assignment.scoreId), deps.newId);
  await insertReadingContent(deps.db, readingId, { ...content, labels: content.labels.map((label) => ({ ...label, id: deps.newId() })) });
  await deps.db.insert(submissions).values({
    id: submissionId,
    assignmentId: assignment.id,
    studentId: actor.userId,
    readingId,
    attempt,
    state: 'working',
    createdAt: deps.now(),
  });
  return submissionId;
}
