import type { Assignment } from '@/db/queries/assignments';

/** An assignment as the editor in the browser holds it: dates as ISO text. */
export interface EditedAssignment extends Omit<Assignment, 'opensAt' | 'dueAt' | 'closesAt'> {
  readonly opensAt: string | null;
  readonly dueAt: string | null;
  readonly closesAt: string | null;
  readonly firstBar: number;
  readonly lastBar: number;
}

export function editedAssignment(assignment: Assignment, range: { readonly firstBar: number; readonly lastBar: number }): EditedAssignment {
  const { opensAt, dueAt, closesAt } = assignment;
  const iso = (date: Date | null) => date?.toISOString() ?? null;
  return { ...assignment, ...range, opensAt: iso(opensAt), dueAt: iso(dueAt), closesAt: iso(closesAt) };
}

/** What the change action takes, as it stands now. */
export function changeInputOf(assignment: EditedAssignment) {
  const { id, title, instructions, segmentation, keysGiven, othersGiven, rubric, opensAt, dueAt, closesAt, attempts, showKeyAfterRelease } = assignment;
  return { assignmentId: id, title, instructions, segmentation, keysGiven, othersGiven, rubric, opensAt, dueAt, closesAt, attempts, showKeyAfterRelease };
}
