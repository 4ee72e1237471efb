import { type Assignment, findAssignment } from '@/db/queries/assignments';
import { type Course, findCourse } from '@/db/queries/courses';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { CourseRole } from '@/lib/vocabularies';
import type { Deps } from './deps';

/** A permission that depends on what the actor is in the course. */
type CoursePermission = (actor: Actor, courseRole: CourseRole | null) => boolean;

/** The course, when it is within reach and the actor may do this in it; not found otherwise. */
export async function findCourseFor(deps: Deps, actor: Actor, courseId: string, can: CoursePermission): Promise<Result<Course, AppError>> {
  const course = await findCourse(deps.db, actor, courseId);
  return course && can(actor, course.courseRole) ? ok(course) : err(appError('not_found'));
}

/** The same for an assignment, by the course it belongs to. */
export async function findAssignmentFor(
  deps: Deps,
  actor: Actor,
  assignmentId: string,
  can: CoursePermission,
): Promise<Result<Assignment, AppError>> {
  const assignment = await findAssignment(deps.db, actor, assignmentId);
  return assignment && can(actor, assignment.courseRole) ? ok(assignment) : err(appError('not_found'));
}
