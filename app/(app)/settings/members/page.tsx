import type { Metadata } from 'next';
import { Section } from '@/components/ui';
import { listInvitations, listMembers } from '@/db/queries/members';
import { canRunDepartment } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { InvitationTable } from './_components/invitation-table';
import { InviteForm } from './_components/invite-form';
import { MemberTable } from './_components/member-table';

export const metadata: Metadata = { title: 'Members' };

export default async function MembersPage() {
  const actor = await requireActor(canRunDepartment);
  const { db, now } = createDeps();
  const [members, invitations] = await Promise.all([listMembers(db, actor), listInvitations(db, actor)]);
  const moment = now();
  return (
    <>
      <Section title="Invite">
        <InviteForm />
      </Section>
      {invitations.length > 0 ? (
        <Section title="Invited" aside={`${invitations.length} not accepted yet`}>
          <InvitationTable
            invitations={invitations.map(({ id, email, role, courseTitle, expiresAt, invitedBy }) => ({
              id,
              email,
              role,
              courseTitle,
              invitedBy,
              until: formatDay(expiresAt),
              expired: expiresAt <= moment,
            }))}
          />
        </Section>
      ) : null}
      <Section title="Members" aside={`${members.length} people`}>
        <MemberTable
          members={members.map(({ userId, name, email, role, since }) => ({ userId, name, email, role, since: formatDay(since) }))}
          ownId={actor.userId}
        />
      </Section>
    </>
  );
}

function formatDay(day: Date): string {
  return new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeZone: 'UTC' }).format(day);
}
