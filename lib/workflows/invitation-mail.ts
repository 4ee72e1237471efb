import { queueMail } from '@/db/queries/outbox';
import { type Actor } from '@/lib/auth/actor';
import type { Role } from '@/lib/vocabularies';
import type { Deps } from './deps';

/** How long an invitation's link works. */
export const INVITATION_DAYS = 14;

export interface InvitationMail {
  readonly email: string;
  readonly role: Role;
  readonly token: string;
  readonly departmentName: string;
  readonly courseTitle: string | null;
}

const AS: Readonly<Record<Role, string>> = {
  owner: 'as one of its owners',
  instructor: 'as an instructor',
  assistant: 'as an assistant',
  student: 'as a student',
};

export async function queueInvitationMail(deps: Deps, actor: Actor, mail: InvitationMail): Promise<void> {
  const place = mail.courseTitle ? `the course “${mail.courseTitle}” (${mail.departmentName})` : mail.departmentName;
  const text = [
    `${actor.name} invites you to ${place} on Understave, ${AS[mail.role]}.`,
    'Open this link to choose your name and password:',
    `${deps.appUrl}/invitation/${mail.token}`,
    `It works once, within ${INVITATION_DAYS} days. If you do not know what this is about, do nothing.`,
  ].join('\n\n');
  const subject = `Invitation to ${mail.courseTitle ?? mail.departmentName}`;
  await queueMail(deps.db, deps.newId(), { to: mail.email, subject, text }, deps.now());
}
