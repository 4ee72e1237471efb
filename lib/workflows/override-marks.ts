import { and, eq, inArray } from 'drizzle-orm';
import type { z } from 'zod';
import { listSubmissions } from '@/db/queries/submissions';
import { marks } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canMark } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import { findAssignmentFor } from './course-access';
import { type Deps, inTransaction } from './deps';
import { refreshSubmissions } from './propose-marks';
import type { overrideMarksInput, settleMarksInput, writeRemarkInput } from './submission-input';

type Marked = Result<{ readonly assignmentId: string }, AppError>;

interface Answers {
  readonly assignmentId: string;
  readonly startTick: number;
  readonly submissionIds: readonly string[];
}

/** Puts points, and a verdict if the marker names one, in place of what was proposed; null takes the proposal again. */
export function overrideMarks(deps: Deps, actor: Actor, input: z.output<typeof overrideMarksInput>): Promise<Marked> {
  return changeMarks(deps, actor, input, async (inside, rows) => {
    if (input.points !== null && rows.some((row) => (input.points ?? 0) > row.maxPoints)) {
      return appError('bad_input', undefined, { points: `At most ${Math.min(...rows.map((row) => row.maxPoints))}.` });
    }
    const change = { overridePoints: input.points, overrideVerdict: input.verdict, markedBy: actor.userId };
    await inside.db.update(marks).set(change).where(inArray(marks.id, rows.map((row) => row.id)));
    return null;
  });
}

/** A remark to each of these students on their answer; an empty one takes it away. */
export function writeRemark(deps: Deps, actor: Actor, input: z.output<typeof writeRemarkInput>): Promise<Marked> {
  return changeMarks(deps, actor, input, async (inside, rows) => {
    const remark = input.remark === '' ? null : input.remark;
    await inside.db.update(marks).set({ remark }).where(inArray(marks.id, rows.map((row) => row.id)));
    return null;
  });
}

/** Marks as looked at, or not. */
export async function settleMarks(deps: Deps, actor: Actor, input: z.output<typeof settleMarksInput>): Promise<Marked> {
  const { assignmentId, settled } = input;
  for (const answers of input.answers) {
    const done = await changeMarks(deps, actor, { assignmentId, ...answers }, async (inside, rows) => {
      const change = { markedBy: settled ? actor.userId : null };
      await inside.db.update(marks).set(change).where(inArray(marks.id, rows.map((row) => row.id)));
      return null;
    });
    if (!done.ok) return done;
  }
  return ok({ assignmentId });
}

interface MarkRow {
  readonly id: string;
  readonly maxPoints: number;
}

async function changeMarks(
  deps: Deps,
  actor: Actor,
  { assignmentId, startTick, submissionIds }: Answers,
  change: (inside: Deps, rows: readonly MarkRow[]) => Promise<AppError | null>,
): Promise<Marked> {
  const assignment = await findAssignmentFor(deps, actor, assignmentId, canMark);
  if (!assignment.ok) return assignment;
  const known = new Set((await listSubmissions(deps.db, actor, assignmentId)).map((submission) => submission.id));
  if (submissionIds.some((submissionId) => !known.has(submissionId))) return err(appError('not_found'));
  return inTransaction(deps, async (inside) => {
    const rows = await inside.db
      .select({ id: marks.id, maxPoints: marks.maxPoints })
      .from(marks)
      .where(and(eq(marks.startTick, startTick), inArray(marks.submissionId, [...submissionIds])));
    if (rows.length === 0) return err(appError('not_found'));
    const refused = await change(inside, rows);
    if (refused) return err(refused);
    await refreshSubmissions(inside, submissionIds);
    return ok({ assignmentId });
  });
}
