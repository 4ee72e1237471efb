import type { z } from 'zod';
import type { Assignment } from '@/db/queries/assignments';
import { noteAudit } from '@/db/queries/audit';
import { type Mark, unsafeListMarks } from '@/db/queries/marks';
import { type Submission, listSubmissions } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canMark, canRelease } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import type { SpanMark } from '@/lib/marking/compare-with-key';
import { sumPoints } from '@/lib/marking/points';
import { type Result, err, ok } from '@/lib/result';
import type { Verdict } from '@/lib/vocabularies';
import type { assignmentInput } from './assignment-input';
import { findAssignmentFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { unsafeGetKey } from './key-of-assignment';
import { compareSubmission, refreshSubmissions, saveProposedMarks } from './propose-marks';
import { changedMail, mailStudents } from './release-marks';

/** What one mark would become if it were marked by the key and rubric of now. Overrides stay whatever happens. */
export interface MarkChange {
  readonly startTick: number;
  readonly studentName: string;
  readonly before: Standing | null;
  readonly after: Standing | null;
}

export interface Standing {
  readonly verdict: Verdict;
  readonly points: number;
  readonly maxPoints: number;
}

interface Remarked {
  readonly submission: Submission;
  readonly proposed: readonly SpanMark[];
  readonly before: readonly Mark[];
}

/** What would change, since the key, its alternatives or the rubric were changed after work was handed in. */
export async function findMarkChanges(deps: Deps, actor: Actor, assignmentId: string): Promise<Result<MarkChange[], AppError>> {
  const found = await findAssignmentFor(deps, actor, assignmentId, canMark);
  if (!found.ok) return found;
  const compared = await compareAll(deps, actor, found.value);
  return ok(compared.flatMap(changesOf).sort((a, b) => a.startTick - b.startTick));
}

async function compareAll(deps: Deps, actor: Actor, assignment: Assignment): Promise<Remarked[]> {
  const { key } = await unsafeGetKey(deps, assignment.id);
  const handedIn = (await listSubmissions(deps.db, actor, assignment.id)).filter((submission) => submission.state !== 'working');
  const before = await unsafeListMarks(deps.db, handedIn.map((submission) => submission.id));
  const compared: Remarked[] = [];
  for (const submission of handedIn) {
    const proposed = await compareSubmission(deps, assignment, key, submission);
    compared.push({ submission, proposed, before: before.filter((mark) => mark.submissionId === submission.id) });
  }
  return compared;
}

function changesOf({ submission, proposed, before }: Remarked): MarkChange[] {
  const starts = new Set([...proposed.map((mark) => mark.start as number), ...before.map((mark) => mark.startTick)]);
  return [...starts].flatMap((startTick) => {
    const was = standingOf(before.find((mark) => mark.startTick === startTick)?.proposed);
    const is = standingOf(proposed.find((mark) => mark.start === startTick));
    const isSame = was && is && was.verdict === is.verdict && was.points === is.points && was.maxPoints === is.maxPoints;
    return isSame ? [] : [{ startTick, studentName: submission.studentName, before: was, after: is }];
  });
}

function standingOf(mark: SpanMark | undefined): Standing | null {
  return mark ? { verdict: mark.verdict, points: mark.points, maxPoints: mark.maxPoints } : null;
}

/** Marks all handed-in work again. Students whose released marks change are told. */
export async function markAgain(
  deps: Deps,
  actor: Actor,
  { assignmentId }: z.output<typeof assignmentInput>,
): Promise<Result<{ readonly assignmentId: string; readonly changed: number }, AppError>> {
  const found = await findAssignmentFor(deps, actor, assignmentId, canMark);
  if (!found.ok) return found;
  const compared = (await compareAll(deps, actor, found.value)).filter((one) => changesOf(one).length > 0);
  const isShown = compared.some(({ submission }) => submission.state === 'released');
  if (isShown && !canRelease(actor, found.value.courseRole)) {
    return err(appError('in_use', 'Some of these marks are released: only who releases marks can change them.'));
  }
  await inTransaction(deps, async (inside) => {
    for (const { submission, proposed } of compared) {
      await saveProposedMarks(inside, submission.id, proposed);
      await refreshSubmissions(inside, [submission.id]);
    }
    await mailStudents(inside, found.value, compared.filter(isVisiblyChanged).map((one) => one.submission), changedMail);
    await noteAudit(inside, actor, { verb: 'marks.again', subjectKind: 'assignment', subjectId: assignmentId, details: { count: compared.length } });
  });
  return ok({ assignmentId, changed: compared.length });
}

/** The student sees other points than before: released, and not held by overrides. */
function isVisiblyChanged({ submission, proposed, before }: Remarked): boolean {
  if (submission.state !== 'released') return false;
  const after = proposed.map((mark) => {
    const held = before.find((old) => old.startTick === mark.start && old.overridden);
    return { points: held?.points ?? mark.points, maxPoints: mark.maxPoints };
  });
  const [was, is] = [sumPoints(before), sumPoints(after)];
  return was.points !== is.points || was.maxPoints !== is.maxPoints;
}
