import type { Metadata } from 'next';
import Link from 'next/link';
import { WarningNote } from '@/components/ui';
import { createDeps } from '@/lib/workflows/deps';
import { findInvitation } from '@/lib/workflows/find-invitation';
import { AcceptForm } from './_components/accept-form';

export const metadata: Metadata = { title: 'Invitation' };

const AS = { owner: 'an owner', instructor: 'an instructor', assistant: 'an assistant', student: 'a student' } as const;

export default async function InvitationPage({ params }: { readonly params: Promise<{ readonly token: string }> }) {
  const { token } = await params;
  const invitation = await findInvitation(createDeps(), token);
  if (!invitation) return <NoInvitation />;
  const { departmentName, courseTitle, role, email, invitedBy } = invitation;
  return (
    <>
      <h1 className="text-title">{courseTitle ?? departmentName}</h1>
      {courseTitle ? <p className="font-book text-lead text-ink-soft italic">{departmentName}</p> : null}
      <p className="mt-3 mb-5 text-ink-soft">
        {invitedBy} invites <span className="text-ink">{email}</span> as {AS[role]}.
      </p>
      <AcceptForm token={token} email={email} known={invitation.userId !== null} />
    </>
  );
}

function NoInvitation() {
  return (
    <>
      <h1 className="mb-4 text-title">Invitation</h1>
      <WarningNote title="This invitation does not work any more">
        It was used, taken back, or is older than two weeks. Ask whoever invited you to send it again.
      </WarningNote>
      <p className="mt-6 border-t border-rule pt-4 text-small text-ink-soft">
        Used it already? <Link href="/sign-in" className="link">Sign in</Link>
      </p>
    </>
  );
}
