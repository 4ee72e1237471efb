import type { Actor, Visitor } from '@/lib/auth/actor';
import type { ErrorCode } from '@/lib/errors';
import type { Deps } from '@/lib/workflows/deps';
import type { World } from '../../support/world';

/**
 * The columns of the matrix. `classmate` is in the course of `student` and of the things tried; `otherStudent` and
 * `otherInstructor` are in another course of the department; `otherOwner` runs another department.
 */
export const COLUMNS = [
  'anonymous',
  'otherStudent',
  'classmate',
  'student',
  'assistant',
  'otherInstructor',
  'instructor',
  'owner',
  'otherOwner',
] as const;
export type Column = (typeof COLUMNS)[number];

/** `ok`, or the code of the error. */
export type Expected = 'ok' | ErrorCode;
export type Row = Readonly<Record<Column, Expected>>;

/** One endpoint: what is sent to it, and what each column gets. */
export interface Case {
  /** Made for the column, in the transaction that the try is rolled back with. */
  readonly input: (world: World, deps: Deps, column: Column) => unknown;
  readonly expected: Row;
}

/** By the endpoint's name. An endpoint that behaves otherwise for another input has a second case, `name (words)`. */
export type Cases = Readonly<Record<string, Case>>;

type Signed = Exclude<Column, 'anonymous'>;

/** These may; the others are told that there is nothing; whoever is signed out is asked to sign in. */
export function may(...columns: readonly Signed[]): Row {
  const expected = (column: Column): Expected => {
    if (column === 'anonymous') return 'signed_out';
    return columns.includes(column) ? 'ok' : 'not_found';
  };
  return Object.fromEntries(COLUMNS.map((column) => [column, expected(column)])) as Row;
}

/** Everyone of the department's staff, on things of the department. */
export const STAFF = may('assistant', 'otherInstructor', 'instructor', 'owner');
/** Anyone's staff: makes or sees things of their own department only. */
export const ANY_STAFF: Row = { ...STAFF, otherOwner: 'ok' };

export function visitorOf(world: World, column: Column): Visitor {
  const actor: Actor | null = column === 'anonymous' ? null : world[column];
  const session = actor && { method: 'password' as const, signedInAt: new Date('2026-09-07T08:00:00.000Z') };
  return { actor, address: '192.0.2.1', session };
}
