import type { CourseRole, ReadingKind, Sharing } from '@/lib/vocabularies';
import type { Actor } from './actor';

/**
 * Every permission is a named pure predicate: the role table of the product, in code. Those that take only the actor
 * guard whole actions and routes (`can:` of lib/http); the others are asked inside workflows and queries about a thing
 * that was already found within the actor's department. Refused means "not found", never "forbidden".
 */

/** Anyone who is signed in. */
export function canBeHere(actor: Actor): boolean {
  return actor.role !== undefined;
}

export function isStaff(actor: Actor): boolean {
  return actor.role === 'owner' || actor.role === 'instructor' || actor.role === 'assistant';
}

/** Members, settings, audit trail, the department's data. */
export function canRunDepartment(actor: Actor): boolean {
  return actor.role === 'owner';
}

/** The library with all that is in it: scores, excerpts, readings, passage search, handouts. */
export function canUseLibrary(actor: Actor): boolean {
  return isStaff(actor);
}

export function canUploadScore(actor: Actor): boolean {
  return isStaff(actor);
}

export function canCutExcerpt(actor: Actor): boolean {
  return isStaff(actor);
}

/** Delete or rename a score or an excerpt: who brought it in, and whoever runs the department. */
export function canChangeLibraryItem(actor: Actor, item: { readonly broughtBy: string }): boolean {
  return isStaff(actor) && (item.broughtBy === actor.userId || canRunDepartment(actor));
}

/** What a permission on a reading depends on. All of it lies in the actor's department. */
export interface ReadingAccess {
  readonly kind: ReadingKind;
  /** Null for the engine's. */
  readonly ownerId: string | null;
  readonly shared: Sharing;
  /** The actor's roles in the courses whose assignments use this reading as key or submission; empty for other kinds. */
  readonly courseRoles: readonly CourseRole[];
  /** For a key: some released submission of the actor belongs to an assignment that shows its key afterwards. */
  readonly keyShown?: boolean;
  /** For a submission: its student may still work on it (state `working`, assignment open). */
  readonly working?: boolean;
}

function ownsReading(actor: Actor, reading: ReadingAccess): boolean {
  return reading.ownerId === actor.userId;
}

function canSeeStaffReading(actor: Actor, reading: ReadingAccess): boolean {
  return isStaff(actor) && (reading.kind === 'engine' || ownsReading(actor, reading) || reading.shared !== 'private');
}

/** Instructors and the owner see every key; assistants those of their courses; students what was shown to them. */
export function canSeeKey(actor: Actor, reading: ReadingAccess): boolean {
  if (actor.role === 'owner' || actor.role === 'instructor') return true;
  if (isStaff(actor) && ownsReading(actor, reading)) return true;
  return reading.courseRoles.some((role) => role !== 'student') || reading.keyShown === true;
}

function canSeeSubmissionReading(actor: Actor, reading: ReadingAccess): boolean {
  return ownsReading(actor, reading) || actor.role === 'owner' || reading.courseRoles.some((role) => role !== 'student');
}

export function canSeeReading(actor: Actor, reading: ReadingAccess): boolean {
  if (reading.kind === 'key') return canSeeKey(actor, reading);
  if (reading.kind === 'submission') return canSeeSubmissionReading(actor, reading);
  return canSeeStaffReading(actor, reading);
}

export function canEditReading(actor: Actor, reading: ReadingAccess): boolean {
  if (reading.kind === 'submission') return ownsReading(actor, reading) && reading.working === true;
  if (!isStaff(actor) || reading.kind === 'engine') return false;
  if (ownsReading(actor, reading)) return true;
  if (reading.kind === 'key') return actor.role === 'owner' || reading.courseRoles.some((role) => role !== 'student');
  return reading.shared === 'edit' && actor.role !== 'owner';
}

/** Write a remark on it: whoever sees it, except that a student reads the remarks and does not answer on a key. */
export function canRemarkOnReading(actor: Actor, reading: ReadingAccess): boolean {
  if (!canSeeReading(actor, reading)) return false;
  return isStaff(actor) || (reading.kind === 'submission' && ownsReading(actor, reading));
}

/** Set what colleagues may do with it. */
export function canShareReading(actor: Actor, reading: ReadingAccess): boolean {
  return isStaff(actor) && ownsReading(actor, reading) && (reading.kind === 'person' || reading.kind === 'key');
}

export function canCreateCourse(actor: Actor): boolean {
  return actor.role === 'owner' || actor.role === 'instructor';
}

/** Join a course by its code. */
export function canJoinCourse(actor: Actor): boolean {
  return actor.role === 'student';
}

/** `courseRole` is the actor's in the course, null when the actor is not in it. */
export function canSeeCourse(actor: Actor, courseRole: CourseRole | null): boolean {
  return actor.role === 'owner' || courseRole !== null;
}

/** Settings of the course, its roster, opening and closing assignments, release. */
export function canRunCourse(actor: Actor, courseRole: CourseRole | null): boolean {
  return actor.role === 'owner' || courseRole === 'instructor';
}

/** Keys and drafts of assignments. */
export function canPrepareAssignments(actor: Actor, courseRole: CourseRole | null): boolean {
  return canRunCourse(actor, courseRole) || courseRole === 'assistant';
}

export function canMark(actor: Actor, courseRole: CourseRole | null): boolean {
  return canRunCourse(actor, courseRole) || courseRole === 'assistant';
}

export function canRelease(actor: Actor, courseRole: CourseRole | null): boolean {
  return canRunCourse(actor, courseRole);
}

export function canHandIn(_actor: Actor, courseRole: CourseRole | null): boolean {
  return courseRole === 'student';
}

/** A submission with its marks: its student always its own (marks once released), and who marks in the course. */
export function canSeeSubmission(
  actor: Actor,
  submission: { readonly studentId: string; readonly courseRole: CourseRole | null },
): boolean {
  return submission.studentId === actor.userId || canMark(actor, submission.courseRole);
}
