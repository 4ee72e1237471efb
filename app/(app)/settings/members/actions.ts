'use server';

import { canRunDepartment } from '@/lib/auth/permissions';
import { action, formAction } from '@/lib/http/action';
import { changeMemberRole, changeMemberRoleInput } from '@/lib/workflows/change-member-role';
import { eraseMember } from '@/lib/workflows/erase-member';
import { inviteMember, inviteMemberInput } from '@/lib/workflows/invite-member';
import { memberInput, removeMember } from '@/lib/workflows/remove-member';
import { invitationInput, resendInvitation } from '@/lib/workflows/resend-invitation';
import { revokeInvitation } from '@/lib/workflows/revoke-invitation';

const owner = { can: canRunDepartment, revalidate: () => ['/settings/members'] };

export const invite = formAction({ name: 'members.invite', input: inviteMemberInput, ...owner }, inviteMember);
export const resend = action({ name: 'invitations.resend', input: invitationInput, ...owner }, resendInvitation);
export const revoke = action({ name: 'invitations.revoke', input: invitationInput, ...owner }, revokeInvitation);
export const changeRole = action({ name: 'members.change_role', input: changeMemberRoleInput, ...owner }, changeMemberRole);
export const remove = action({ name: 'members.remove', input: memberInput, ...owner }, removeMember);
export const erase = action({ name: 'members.erase', input: memberInput, ...owner }, eraseMember);
