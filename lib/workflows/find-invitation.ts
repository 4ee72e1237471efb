import { unsafeFindInvitationByToken } from '@/db/queries/members';
import { hashToken } from '@/lib/auth/token';
import type { Deps } from './deps';

/** The invitation that a link's token opens; null when it is unknown, used, revoked or too old. The token is the permission. */
export function findInvitation(deps: Deps, token: string) {
  return unsafeFindInvitationByToken(deps.db, hashToken(token), deps.now());
}
