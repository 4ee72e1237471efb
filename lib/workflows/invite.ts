import { and, eq, isNull } from 'drizzle-orm';
import { noteAudit } from '@/db/queries/audit';
import { getDepartment } from '@/db/queries/members';
import { invitations } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { hashToken, newToken } from '@/lib/auth/token';
import type { Role } from '@/lib/vocabularies';
import { type Deps, inTransaction } from './deps';
import { INVITATION_DAYS, queueInvitationMail } from './invitation-mail';

const DAY = 24 * 3600 * 1000;

export interface InvitationWords {
  /** Normal form (lib/auth/email). */
  readonly email: string;
  readonly role: Role;
  readonly course: { readonly id: string; readonly title: string } | null;
}

/**
 * Writes an invitation and its mail. Earlier ones of the same person to the same place stop working. Asks no
 * permission: the workflows that call it do.
 */
export async function writeInvitation(deps: Deps, actor: Actor, words: InvitationWords): Promise<{ readonly invitationId: string }> {
  const invitationId = deps.newId();
  const token = newToken();
  await inTransaction(deps, async (deps) => {
    await revokeEarlier(deps, actor, words);
    await deps.db.insert(invitations).values({
      id: invitationId,
      departmentId: actor.departmentId,
      courseId: words.course?.id ?? null,
      email: words.email,
      role: words.role,
      tokenHash: hashToken(token),
      expiresAt: new Date(deps.now().getTime() + INVITATION_DAYS * DAY),
      invitedBy: actor.userId,
      createdAt: deps.now(),
    });
    const { name: departmentName } = await getDepartment(deps.db, actor);
    const { email, role, course } = words;
    await queueInvitationMail(deps, actor, { email, role, token, departmentName, courseTitle: course?.title ?? null });
    const details = { role, ...(course ? { courseId: course.id } : {}) };
    await noteAudit(deps, actor, { verb: 'members.invite', subjectKind: 'invitation', subjectId: invitationId, details });
  });
  return { invitationId };
}

async function revokeEarlier(deps: Deps, actor: Actor, words: InvitationWords): Promise<void> {
  await deps.db
    .update(invitations)
    .set({ revokedAt: deps.now() })
    .where(
      and(
        eq(invitations.departmentId, actor.departmentId),
        eq(invitations.email, words.email),
        words.course ? eq(invitations.courseId, words.course.id) : isNull(invitations.courseId),
        isNull(invitations.acceptedAt),
        isNull(invitations.revokedAt),
      ),
    );
}
