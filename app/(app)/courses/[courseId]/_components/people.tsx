'use client';

import { useAct } from '@/app/_components/use-act';
import { Button, Section } from '@/components/ui';
import type { PendingInvitation, RosterRow } from '@/db/queries/courses';
import { COURSE_ROLES } from '@/lib/vocabularies';
import { openEnrolment } from '../../actions';
import { AddPeople } from './add-people';
import { RosterTable } from './roster-table';

interface PeopleProps {
  readonly courseId: string;
  readonly roster: readonly RosterRow[];
  readonly invitations: readonly (Omit<PendingInvitation, 'expiresAt'> & { readonly expired: boolean })[];
  readonly enrolmentCode: string | null;
  readonly runs: boolean;
  readonly ownId: string;
}

/** Who is in the course, who is invited, and the ways in. */
export function People({ courseId, roster, invitations, enrolmentCode, runs, ownId }: PeopleProps) {
  const ordered = COURSE_ROLES.flatMap((role) => roster.filter((row) => row.courseRole === role));
  return (
    <>
      {runs ? (
        <div className="mb-6 flex flex-wrap items-end justify-between gap-4">
          <AddPeople courseId={courseId} known={roster.map((row) => row.email)} />
          <EnrolmentCode courseId={courseId} code={enrolmentCode} />
        </div>
      ) : null}
      <RosterTable courseId={courseId} roster={ordered} runs={runs} ownId={ownId} />
      {invitations.length > 0 ? (
        <div className="mt-8">
          <Section title="Invited" aside={`${invitations.length} not accepted yet`}>
            <ul className="divide-y divide-rule border-y border-rule">
              {invitations.map(({ id, email, role, expired }) => (
                <li key={id} className="flex flex-wrap items-baseline justify-between gap-x-6 py-1.5">
                  <span>{email}</span>
                  <span className="text-small text-ink-soft">{expired ? `${role}, expired: invite again` : role}</span>
                </li>
              ))}
            </ul>
          </Section>
        </div>
      ) : null}
    </>
  );
}

function EnrolmentCode({ courseId, code }: { readonly courseId: string; readonly code: string | null }) {
  const [busy, act] = useAct();
  const set = (open: boolean) => void act(() => openEnrolment({ courseId, open }), open ? 'A new code works from now on.' : 'No code works any more.');
  return (
    <div className="flex flex-wrap items-baseline gap-x-4 gap-y-2">
      <p>
        <span className="caps text-small text-ink-soft">Enrolment code </span>
        {code ? <strong className="tabular font-medium tracking-wide">{code}</strong> : <span className="text-ink-soft">none: students are added by you</span>}
      </p>
      <span className="flex gap-2">
        <Button size="small" busy={busy} onClick={() => set(true)}>{code ? 'New code' : 'Make a code'}</Button>
        {code ? <Button size="small" kind="quiet" busy={busy} onClick={() => set(false)}>Stop it</Button> : null}
      </span>
    </div>
  );
}
