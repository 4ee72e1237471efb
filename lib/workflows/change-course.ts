import { randomInt } from 'node:crypto';
import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import { isDuplicate } from '@/db/client';
import { noteAudit } from '@/db/queries/audit';
import { courses } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { canRunCourse } from '@/lib/auth/permissions';
import type { AppError } from '@/lib/errors';
import { type Result, ok } from '@/lib/result';
import { findCourseFor } from './course-access';
import type { changeCourseInput, setArchivedInput, setConventionsInput, setEnrolmentInput } from './course-input';
import type { Deps } from './deps';

interface ChangedCourse {
  readonly courseId: string;
}

type CourseChange = Partial<typeof courses.$inferInsert>;

async function changeRow(deps: Deps, actor: Actor, courseId: string, verb: string, change: CourseChange): Promise<Result<ChangedCourse, AppError>> {
  const course = await findCourseFor(deps, actor, courseId, canRunCourse);
  if (!course.ok) return course;
  await deps.db.update(courses).set(change).where(eq(courses.id, courseId));
  await noteAudit(deps, actor, { verb, subjectKind: 'course', subjectId: courseId });
  return ok({ courseId });
}

/** Title, term and course code. */
export function changeCourse(deps: Deps, actor: Actor, { courseId, ...words }: z.output<typeof changeCourseInput>) {
  return changeRow(deps, actor, courseId, 'courses.change', words);
}

/** How the course spells its labels, on screen, in keys and on handouts; null for the defaults. */
export function setConventions(deps: Deps, actor: Actor, { courseId, conventions }: z.output<typeof setConventionsInput>) {
  return changeRow(deps, actor, courseId, 'courses.conventions', { conventions });
}

/** A course that is over: its work can be read and nobody joins. */
export function setArchived(deps: Deps, actor: Actor, { courseId, archived }: z.output<typeof setArchivedInput>) {
  const change = archived ? { archivedAt: deps.now(), enrolmentCode: null } : { archivedAt: null };
  return changeRow(deps, actor, courseId, archived ? 'courses.archive' : 'courses.restore', change);
}

/** Opens the course to a new code (the old one stops working), or closes it to codes. */
export async function setEnrolment(
  deps: Deps,
  actor: Actor,
  { courseId, open }: z.output<typeof setEnrolmentInput>,
): Promise<Result<ChangedCourse & { readonly code: string | null }, AppError>> {
  const code = open ? newEnrolmentCode() : null;
  try {
    const changed = await changeRow(deps, actor, courseId, open ? 'courses.open' : 'courses.close', { enrolmentCode: code });
    return changed.ok ? ok({ courseId, code }) : changed;
  } catch (error) {
    if (isDuplicate(error)) return setEnrolment(deps, actor, { courseId, open });
    throw error;
  }
}

/** No letter that is read for another, or for a figure, when it is copied from a board. */
const LETTERS = 'ACDEFGHJKMNPQRTUVWXY34679';

function newEnrolmentCode(): string {
  const letters = Array.from({ length: 8 }, () => LETTERS.charAt(randomInt(LETTERS.length))).join('');
  return `${letters.slice(0, 4)}-${letters.slice(4)}`;
}
