/** The product's role table, row by row. Source: product.md, "Roles". */
import { describe, expect, it } from 'vitest';
import type { Actor } from '@/lib/auth/actor';
import {
  type ReadingAccess,
  canCreateCourse,
  canEditReading,
  canHandIn,
  canMark,
  canPrepareAssignments,
  canRelease,
  canRemarkOnReading,
  canRunCourse,
  canRunDepartment,
  canSeeKey,
  canSeeReading,
  canSeeSubmission,
  canShareReading,
  canUploadScore,
} from '@/lib/auth/permissions';
import { ROLES, type Role } from '@/lib/vocabularies';

function actor(role: Role, userId = 'me'): Actor {
  return { userId, departmentId: 'department', role, name: 'Name', email: 'name@example.org' };
}

function reading(facts: Partial<ReadingAccess>): ReadingAccess {
  return { kind: 'person', ownerId: 'someone', shared: 'private', courseRoles: [], ...facts };
}

/** The roles that pass, of all four. */
function rolesThat(can: (who: Actor) => boolean): readonly Role[] {
  return ROLES.filter((role) => can(actor(role)));
}

describe('the department', () => {
  it('is run by its owners', () => {
    expect(rolesThat(canRunDepartment)).toEqual(['owner']);
  });

  it('has a library for its staff', () => {
    expect(rolesThat(canUploadScore)).toEqual(['owner', 'instructor', 'assistant']);
  });

  it('has courses that owners and instructors open', () => {
    expect(rolesThat(canCreateCourse)).toEqual(['owner', 'instructor']);
  });
});

describe('another’s reading', () => {
  it('is seen by nobody while private, not by the owner of the department either', () => {
    expect(rolesThat((who) => canSeeReading(who, reading({})))).toEqual([]);
  });

  it('is commented on by all staff once shared', () => {
    const shared = reading({ shared: 'comment' });
    expect(rolesThat((who) => canRemarkOnReading(who, shared))).toEqual(['owner', 'instructor', 'assistant']);
    expect(rolesThat((who) => canEditReading(who, shared))).toEqual([]);
  });

  it('is edited by instructors and assistants when shared for that; the owner comments', () => {
    expect(rolesThat((who) => canEditReading(who, reading({ shared: 'edit' })))).toEqual(['instructor', 'assistant']);
  });

  it('is shared only by whose it is', () => {
    expect(canShareReading(actor('instructor'), reading({ ownerId: 'me' }))).toBe(true);
    expect(canShareReading(actor('owner'), reading({ shared: 'edit' }))).toBe(false);
  });
});

describe('the engine’s reading', () => {
  const engine = reading({ kind: 'engine', ownerId: null });

  it('is seen by staff and edited by nobody', () => {
    expect(rolesThat((who) => canSeeReading(who, engine))).toEqual(['owner', 'instructor', 'assistant']);
    expect(rolesThat((who) => canEditReading(who, engine))).toEqual([]);
  });
});

describe('an answer key', () => {
  const key = reading({ kind: 'key' });

  it('is seen by owners and instructors, by assistants of its courses', () => {
    expect(rolesThat((who) => canSeeKey(who, key))).toEqual(['owner', 'instructor']);
    expect(canSeeKey(actor('assistant'), { ...key, courseRoles: ['assistant'] })).toBe(true);
  });

  it('is seen by a student only after release, if the assignment says so', () => {
    expect(canSeeKey(actor('student'), { ...key, courseRoles: ['student'] })).toBe(false);
    expect(canSeeKey(actor('student'), { ...key, courseRoles: ['student'], keyShown: true })).toBe(true);
    expect(canEditReading(actor('student'), { ...key, courseRoles: ['student'], keyShown: true })).toBe(false);
  });
});

describe('a student’s work', () => {
  const work = reading({ kind: 'submission', ownerId: 'me', working: true, courseRoles: ['student'] });

  it('is written by the student while it may be, and by nobody else', () => {
    expect(canEditReading(actor('student'), work)).toBe(true);
    expect(canEditReading(actor('student'), { ...work, working: false })).toBe(false);
    expect(canEditReading(actor('instructor', 'teacher'), { ...work, courseRoles: ['instructor'] })).toBe(false);
    expect(canEditReading(actor('owner', 'boss'), { ...work, courseRoles: [] })).toBe(false);
  });

  it('is seen by who marks in the course, not by a classmate or another course’s instructor', () => {
    expect(canSeeReading(actor('instructor', 'teacher'), { ...work, courseRoles: ['instructor'] })).toBe(true);
    expect(canSeeReading(actor('assistant', 'helper'), { ...work, courseRoles: ['assistant'] })).toBe(true);
    expect(canSeeReading(actor('student', 'classmate'), { ...work, courseRoles: ['student'] })).toBe(false);
    expect(canSeeReading(actor('instructor', 'elsewhere'), { ...work, courseRoles: [] })).toBe(false);
  });

  it('is handed in by the course’s students only', () => {
    expect(canHandIn(actor('student'), 'student')).toBe(true);
    expect(canHandIn(actor('student'), null)).toBe(false);
    expect(canHandIn(actor('owner'), null)).toBe(false);
  });

  it('with its marks is seen by the student and by who marks', () => {
    const submission = { studentId: 'me', courseRole: 'student' } as const;
    expect(canSeeSubmission(actor('student'), submission)).toBe(true);
    expect(canSeeSubmission(actor('student', 'classmate'), submission)).toBe(false);
    expect(canSeeSubmission(actor('assistant', 'helper'), { ...submission, courseRole: 'assistant' })).toBe(true);
  });
});

describe('a course', () => {
  it('is run by its instructors and the owner', () => {
    expect(canRunCourse(actor('instructor'), 'instructor')).toBe(true);
    expect(canRunCourse(actor('instructor'), null)).toBe(false);
    expect(canRunCourse(actor('owner'), null)).toBe(true);
    expect(canRunCourse(actor('assistant'), 'assistant')).toBe(false);
  });

  it('lets its assistants prepare and mark, and not release', () => {
    expect(canPrepareAssignments(actor('assistant'), 'assistant')).toBe(true);
    expect(canMark(actor('assistant'), 'assistant')).toBe(true);
    expect(canRelease(actor('assistant'), 'assistant')).toBe(false);
    expect(canMark(actor('assistant'), null)).toBe(false);
    expect(canMark(actor('student'), 'student')).toBe(false);
  });
});
