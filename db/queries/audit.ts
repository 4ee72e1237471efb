import { and, desc, eq, lt } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { auditEvents, users } from '@/db/schema';
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

/** The department's trail, newest first, a page at a time: those before an instant. */
export async function getAuditEvents(db: Db, actor: Actor, before: Date | null, limit: number): Promise<AuditEvent[]> {
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
    .where(
      and(eq(auditEvents.departmentId, actor.departmentId), before ? lt(auditEvents.createdAt, before) : undefined),
    )
    .orderBy(desc(auditEvents.createdAt), desc(auditEvents.id))
    .limit(limit);
}
