import { and, desc, eq, inArray, lt, or } from 'drizzle-orm';
import type { MySqlColumn, MySqlTable } from 'drizzle-orm/mysql-core';
import type { Db } from '@/db/client';
import { assignments, auditEvents, courses, excerpts, readings, scores, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';

export interface AuditNote {
  /** `members.invite`: the aggregate and what was done. */
  readonly verb: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  /** Ids, roles, settings. No text that a person wrote. */
  readonly details?: Readonly<Record<string, unknown>>;
}

/** Writes to the department's audit trail, in the transaction of what it tells of. */
export async function noteAudit(
  deps: { readonly db: Db; now(): Date; newId(): string },
  actor: Pick<Actor, 'departmentId'> & { readonly userId: string | null },
  note: AuditNote,
): Promise<void> {
  await deps.db.insert(auditEvents).values({
    id: deps.newId(),
    departmentId: actor.departmentId,
    actorId: actor.userId,
    verb: note.verb,
    subjectKind: note.subjectKind,
    subjectId: note.subjectId,
    details: note.details ?? {},
    createdAt: deps.now(),
  });
}

export interface AuditEvent {
  readonly id: string;
  readonly verb: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly details: Readonly<Record<string, unknown>>;
  readonly createdAt: Date;
  /** Null for the system. */
  readonly actorName: string | null;
}

/** Where a page of the trail begins: after this event. */
export type AuditPlace = Pick<AuditEvent, 'createdAt' | 'id'>;

function isBefore({ createdAt, id }: AuditPlace) {
  return or(lt(auditEvents.createdAt, createdAt), and(eq(auditEvents.createdAt, createdAt), lt(auditEvents.id, id)));
}

/** The department's trail, newest first, a page at a time. */
export async function getAuditEvents(db: Db, actor: Actor, after: AuditPlace | null, limit: number): Promise<AuditEvent[]> {
  return db
    .select({
      id: auditEvents.id,
      verb: auditEvents.verb,
      subjectKind: auditEvents.subjectKind,
      subjectId: auditEvents.subjectId,
      details: auditEvents.details,
      createdAt: auditEvents.createdAt,
      actorName: users.name,
    })
    .from(auditEvents)
    .leftJoin(users, eq(users.id, auditEvents.actorId))
    .where(and(eq(auditEvents.departmentId, actor.departmentId), after ? isBefore(after) : undefined))
    .orderBy(desc(auditEvents.createdAt), desc(auditEvents.id))
    .limit(limit);
}

/** Where the name of a subject is found, by its kind. A kind that is not here is shown by its id: a reading may be private. */
const NAMED: Readonly<Record<string, { readonly table: MySqlTable; readonly id: MySqlColumn; readonly name: MySqlColumn }>> = {
  user: { table: users, id: users.id, name: users.name },
  course: { table: courses, id: courses.id, name: courses.title },
  score: { table: scores, id: scores.id, name: scores.title },
  excerpt: { table: excerpts, id: excerpts.id, name: excerpts.title },
  key: { table: readings, id: readings.id, name: readings.title },
  assignment: { table: assignments, id: assignments.id, name: assignments.title },
};

/** What the events' subjects are called now, by id. The events were scoped when they were read. */
export async function findSubjectNames(db: Db, events: readonly AuditEvent[]): Promise<ReadonlyMap<string, string>> {
  const names = new Map<string, string>();
  for (const [kind, { table, id, name }] of Object.entries(NAMED)) {
    const ids = events.filter((event) => event.subjectKind === kind).map((event) => event.subjectId);
    if (ids.length === 0) continue;
    const rows = await db.select({ id, name }).from(table).where(inArray(id, ids));
    for (const row of rows) names.set(String(row.id), String(row.name));
  }
  return names;
}
