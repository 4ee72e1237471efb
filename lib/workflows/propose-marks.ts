import { and, eq, inArray, notInArray, sql } from 'drizzle-orm';
import type { Assignment } from '@/db/queries/assignments';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { marks, submissions } from '@/db/schema';
import { type SpanMark, compareWithKey } from '@/lib/marking/compare-with-key';
import type { KeyReading } from '@/lib/marking/key-reading';
import type { Deps } from './deps';
import { settingOf } from './key-of-assignment';
import { readingOf } from './stored-reading';

/** What marking needs of a submission. */
export interface ToMark {
  readonly id: string;
  readonly readingId: string;
  readonly startTick: number;
  readonly endTick: number;
}

/** Compares a submission as it lies with the key. */
export async function compareSubmission(deps: Deps, assignment: Assignment, key: KeyReading, submission: ToMark): Promise<SpanMark[]> {
  const { readingId, startTick, endTick } = submission;
  const answer = readingOf(await unsafeLoadReadingContent(deps.db, { id: readingId, startTick, endTick }));
  return compareWithKey(key, answer, assignment.rubric, settingOf(assignment));
}

/** Writes proposed marks. What a person put in a mark's place stays; marks of spans that are no longer asked go. */
export async function saveProposedMarks(deps: Deps, submissionId: string, proposed: readonly SpanMark[]): Promise<void> {
  const starts = proposed.map((mark) => mark.start as number);
  const left = and(eq(marks.submissionId, submissionId), starts.length > 0 ? notInArray(marks.startTick, starts) : undefined);
  await deps.db.delete(marks).where(left);
  for (const mark of proposed) {
    const columns = {
      keyLabelId: mark.keyLabelId,
      endTick: mark.end,
      verdict: mark.verdict,
      points: mark.points,
      maxPoints: mark.maxPoints,
      proposed: mark,
      reasons: mark.reasons.map((reason) => reason.text),
    };
    const row = { id: deps.newId(), submissionId, startTick: mark.start, ...columns, createdAt: deps.now() };
    await deps.db.insert(marks).values(row).onDuplicateKeyUpdate({ set: columns });
  }
}

/** Brings a submission's state and sum in line with its marks: marked when someone has looked at all of them. */
export async function refreshSubmissions(deps: Deps, submissionIds: readonly string[]): Promise<void> {
  if (submissionIds.length === 0) return;
  const open = sql`exists (select 1 from ${marks} where ${marks.submissionId} = ${submissions.id} and ${marks.markedBy} is null)`;
  await deps.db
    .update(submissions)
    .set({ state: sql`case when ${submissions.state} = 'released' then 'released' when ${open} then 'handed_in' else 'marked' end` })
    .where(and(inArray(submissions.id, [...submissionIds]), inArray(submissions.state, ['handed_in', 'marked', 'released'])));
  await deps.db
    .update(submissions)
    .set({
      points: sql`(select sum(coalesce(${marks.overridePoints}, ${marks.points})) from ${marks} where ${marks.submissionId} = ${submissions.id})`,
      maxPoints: sql`(select sum(${marks.maxPoints}) from ${marks} where ${marks.submissionId} = ${submissions.id})`,
    })
    .where(inArray(submissions.id, [...submissionIds]));
}
