import { and, asc, count, desc, eq, gt, isNull, ne } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { courses, departmentMembers, departments, invitations, users } from '@/db/schema';
import type { DepartmentSettings } from '@/db/schema/departments';
import type { Actor } from '@/lib/auth/actor';
import type { Role } from '@/lib/vocabularies';

export interface Department {
  readonly id: string;
  readonly name: string;
  readonly settings: DepartmentSettings;
}

/** The actor's own department. */
export async function getDepartment(db: Db, actor: Actor): Promise<Department> {
  const [row] = await db
    .select({ id: departments.id, name: departments.name, settings: departments.settings })
    .from(departments)
    .where(eq(departments.id, actor.departmentId));
  if (!row) throw new Error('an actor has a department');
  return row;
}

export interface Member {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly since: Date;
}

const MEMBER = {
  userId: users.id,
  name: users.name,
  email: users.email,
  role: departmentMembers.role,
  since: departmentMembers.createdAt,
};

/** Everyone of the actor's department, by role and name. */
export async function listMembers(db: Db, actor: Actor): Promise<Member[]> {
  return db
    .select(MEMBER)
    .from(departmentMembers)
    .innerJoin(users, eq(users.id, departmentMembers.userId))
    .where(eq(departmentMembers.departmentId, actor.departmentId))
    .orderBy(asc(departmentMembers.role), asc(users.name));
}

/** A member of the actor's department. Inside a transaction the membership stays as it is until its end. */
export async function findMember(db: Db, actor: Actor, userId: string): Promise<Member | null> {
  const [row] = await db
    .select(MEMBER)
    .from(departmentMembers)
    .innerJoin(users, eq(users.id, departmentMembers.userId))
    .where(and(eq(departmentMembers.departmentId, actor.departmentId), eq(departmentMembers.userId, userId)))
    .for('update');
  return row ?? null;
}

/** Whether the department would still have an owner without this person. Locks the owners' rows: two cannot leave at once. */
export async function hasOtherOwner(db: Db, departmentId: string, userId: string): Promise<boolean> {
  const owners = await db
    .select({ userId: departmentMembers.userId })
    .from(departmentMembers)
    .where(and(eq(departmentMembers.departmentId, departmentId), eq(departmentMembers.role, 'owner')))
    .for('update');
  return owners.some((owner) => owner.userId !== userId);
}

/** How many departments the person belongs to beside the actor's. */
export async function countOtherDepartments(db: Db, actor: Actor, userId: string): Promise<number> {
  const [row] = await db
    .select({ departments: count() })
    .from(departmentMembers)
    .where(and(eq(departmentMembers.userId, userId), ne(departmentMembers.departmentId, actor.departmentId)));
  return row?.departments ?? 0;
}

export interface Invitation {
  readonly id: string;
  readonly email: string;
  readonly role: Role;
  readonly courseId: string | null;
  readonly courseTitle: string | null;
  readonly expiresAt: Date;
  readonly invitedBy: string;
}

const INVITATION = {
  id: invitations.id,
  email: invitations.email,
  role: invitations.role,
  courseId: invitations.courseId,
  courseTitle: courses.title,
  expiresAt: invitations.expiresAt,
  invitedBy: users.name,
};

/** Neither accepted nor revoked; it may have expired. */
const isPending = and(isNull(invitations.acceptedAt), isNull(invitations.revokedAt));

/** The department's pending invitations, newest first; expired ones are among them, to be sent again. */
export async function listInvitations(db: Db, actor: Actor): Promise<Invitation[]> {
  return db
    .select(INVITATION)
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .leftJoin(courses, eq(courses.id, invitations.courseId))
    .where(and(eq(invitations.departmentId, actor.departmentId), isPending))
    .orderBy(desc(invitations.createdAt), asc(invitations.email));
}

export async function findInvitation(db: Db, actor: Actor, invitationId: string): Promise<Invitation | null> {
  const [row] = await db
    .select(INVITATION)
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .leftJoin(courses, eq(courses.id, invitations.courseId))
    .where(and(eq(invitations.departmentId, actor.departmentId), eq(invitations.id, invitationId), isPending));
  return row ?? null;
}

export interface OpenInvitation extends Invitation {
  readonly departmentId: string;
  readonly departmentName: string;
  /** Someone with this e-mail has an account already. */
  readonly userId: string | null;
}

/** By the secret of its link, before there is an actor: whoever has the link may see who invites them to what. */
export async function unsafeFindInvitationByToken(db: Db, tokenHash: string, now: Date): Promise<OpenInvitation | null> {
  const [invitation] = await db
    .select({ ...INVITATION, departmentId: departments.id, departmentName: departments.name })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .innerJoin(departments, eq(departments.id, invitations.departmentId))
    .leftJoin(courses, eq(courses.id, invitations.courseId))
    .where(and(eq(invitations.tokenHash, tokenHash), isPending, gt(invitations.expiresAt, now)))
    .for('update');
  if (!invitation) return null;
  const [user] = await db.select({ id: users.id }).from(users).where(eq(users.email, invitation.email));
  return { ...invitation, userId: user?.id ?? null };
}
