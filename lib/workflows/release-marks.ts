import { and, eq, inArray } from 'drizzle-orm';
import type { z } from 'zod';
import type { Assignment } from '@/db/queries/assignments';
import { noteAudit } from '@/db/queries/audit';
import { queueMail } from '@/db/queries/outbox';
import { type Submission, countingAttempts, listAddresses, listSubmissions } from '@/db/queries/submissions';
import { submissions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRelease } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { findAssignmentFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { refreshSubmissions } from './propose-marks';
import type { releaseMarksInput } from './submission-input';

/** Shows students their marks: from now on each sees theirs, and gets a mail that says where. No mark is in the mail. */
export async function releaseMarks(
  deps: Deps,
  actor: Actor,
  { assignmentId, submissionIds }: z.output<typeof releaseMarksInput>,
): Promise<Result<{ readonly assignmentId: string; readonly released: number }, AppError>> {
  const found = await findAssignmentFor(deps, actor, assignmentId, canRelease);
  if (!found.ok) return found;
  const counting = countingAttempts(await listSubmissions(deps.db, actor, assignmentId));
  const chosen = counting.filter((submission) => submissionIds.includes(submission.id));
  if (chosen.length < new Set(submissionIds).size) return err(appError('not_found'));
  const toRelease = chosen.filter((submission) => submission.state !== 'released');
  await inTransaction(deps, (inside) => release(inside, actor, found.value, toRelease));
  return ok({ assignmentId, released: toRelease.length });
}

async function release(deps: Deps, actor: Actor, assignment: Assignment, toRelease: readonly Submission[]): Promise<void> {
  if (toRelease.length === 0) return;
  const ids = toRelease.map((submission) => submission.id);
  await refreshSubmissions(deps, ids);
  await deps.db
    .update(submissions)
    .set({ state: 'released', releasedAt: deps.now() })
    .where(and(inArray(submissions.id, ids), inArray(submissions.state, ['handed_in', 'marked']), eq(submissions.assignmentId, assignment.id)));
  await mailStudents(deps, assignment, toRelease, releaseMail);
  const details = { count: ids.length };
  await noteAudit(deps, actor, { verb: 'marks.release', subjectKind: 'assignment', subjectId: assignment.id, details });
}

interface Words {
  readonly subject: string;
  readonly opening: string;
}

type MailWords = (assignment: Assignment) => Words;

const releaseMail: MailWords = ({ title, courseTitle }) => ({
  subject: `Your analysis has been marked: ${title}`,
  opening: `Your work on “${title}” in ${courseTitle} has been marked. Your feedback is on the score:`,
});

export const changedMail: MailWords = ({ title, courseTitle }) => ({
  subject: `Your marks have changed: ${title}`,
  opening: `Your marks for “${title}” in ${courseTitle} were looked at again and have changed. Your feedback is on the score:`,
});

/** One mail to each student with the link to their own feedback. */
export async function mailStudents(deps: Deps, assignment: Assignment, to: readonly Submission[], words: MailWords): Promise<void> {
  const addresses = await listAddresses(deps.db, to.map((submission) => submission.studentId));
  const { subject, opening } = words(assignment);
  for (const submission of to) {
    const person = addresses.get(submission.studentId);
    if (!person) continue;
    const link = `${deps.appUrl}/submissions/${submission.id}/feedback`;
    const text = [`Dear ${person.name},`, opening, link, 'Sign in to see it. Questions belong to your instructor, or in a remark on the label.'].join('\n\n');
    await queueMail(deps.db, deps.newId(), { to: person.email, subject, text }, deps.now());
  }
}
