import { type ListedAssignment, listAssignments } from '@/db/queries/assignments';
import type { Course } from '@/db/queries/courses';
import { type GradebookCell, type GradebookStudent, listGradebookCells, listGradebookStudents, unsafeListMarks } from '@/db/queries/marks';
import { countingAttempts } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canMark } from '@/lib/auth/permissions';
import type { AppError } from '@/lib/errors';
import { type Sum, sumPoints } from '@/lib/marking/points';
import type { TallyAnswer } from '@/lib/marking/tally';
import { type Result, ok } from '@/lib/result';
import { findCourseFor } from './course-access';
import type { Deps } from './deps';

export interface GradebookRow extends Sum {
  readonly student: GradebookStudent;
  /** One per assignment, in their order; null where nothing was handed in. */
  readonly cells: readonly (GradebookCell | null)[];
}

export interface Gradebook {
  readonly course: Course;
  readonly assignments: readonly ListedAssignment[];
  readonly rows: readonly GradebookRow[];
}

/** Marks of a course by student and assignment, as they stand, released or not. */
export async function getGradebook(deps: Deps, actor: Actor, courseId: string): Promise<Result<Gradebook, AppError>> {
  const course = await findCourseFor(deps, actor, courseId, canMark);
  if (!course.ok) return course;
  const [all, students, cells] = await Promise.all([
    listAssignments(deps.db, actor, courseId),
    listGradebookStudents(deps.db, actor, courseId),
    listGradebookCells(deps.db, actor, courseId),
  ]);
  const assignments = all.filter((assignment) => assignment.state !== 'draft');
  const rows = students.map((student) => rowOf(student, assignments, cells.filter((cell) => cell.studentId === student.userId)));
  return ok({ course: course.value, assignments, rows });
}

function rowOf(student: GradebookStudent, assignments: readonly ListedAssignment[], own: readonly GradebookCell[]): GradebookRow {
  const cells = assignments.map(({ id }) => countingAttempts(own.filter((cell) => cell.assignmentId === id))[0] ?? null);
  const marked = cells.flatMap((cell) => (cell && cell.points !== null && cell.maxPoints !== null ? [{ points: cell.points, maxPoints: cell.maxPoints }] : []));
  return { student, cells, ...sumPoints(marked) };
}

/** What the tallies of one assignment are made from: the counting attempts with their marks as they hold. */
export interface AssignmentAnswers {
  readonly assignment: ListedAssignment;
  readonly answers: readonly TallyAnswer[];
}

export async function unsafeListAnswers(deps: Deps, { assignments, rows }: Gradebook): Promise<AssignmentAnswers[]> {
  const cells = rows.flatMap((row) => row.cells.flatMap((cell) => (cell ? [cell] : [])));
  const marks = await unsafeListMarks(deps.db, cells.map((cell) => cell.submissionId));
  return assignments.map((assignment) => ({
    assignment,
    answers: cells
      .filter((cell) => cell.assignmentId === assignment.id)
      .map((cell) => ({
        studentId: cell.studentId,
        marks: marks
          .filter((mark) => mark.submissionId === cell.submissionId)
          .map(({ startTick, verdict, points, maxPoints, proposed }) => ({ start: startTick, verdict, points, maxPoints, errors: proposed.errors })),
      })),
  }));
}
