'use server';

import { publicFormAction } from '@/lib/http/action';
import { acceptInvitation, acceptInvitationInput } from '@/lib/workflows/accept-invitation';

export const accept = publicFormAction({ name: 'invitations.accept', input: acceptInvitationInput }, acceptInvitation);
