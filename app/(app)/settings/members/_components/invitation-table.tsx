'use client';

import { useAct } from '@/app/_components/use-act';
import { Button, Mark, Row, Table, Td, Th } from '@/components/ui';
import type { Role } from '@/lib/vocabularies';
import { resend, revoke } from '../actions';

export interface InvitationRow {
  readonly id: string;
  readonly email: string;
  readonly role: Role;
  readonly courseTitle: string | null;
  readonly invitedBy: string;
  /** The last day its link works. */
  readonly until: string;
  readonly expired: boolean;
}

export function InvitationTable({ invitations }: { readonly invitations: readonly InvitationRow[] }) {
  return (
    <Table caption="Invitations not accepted yet">
      <thead>
        <Row>
          <Th>E-mail</Th>
          <Th>As</Th>
          <Th>Invited by</Th>
          <Th>Works until</Th>
          <Th><span className="sr-only">Actions</span></Th>
        </Row>
      </thead>
      <tbody>
        {invitations.map((invitation) => <InvitationLine key={invitation.id} invitation={invitation} />)}
      </tbody>
    </Table>
  );
}

function InvitationLine({ invitation }: { readonly invitation: InvitationRow }) {
  const { id, email, role, courseTitle, invitedBy, until, expired } = invitation;
  const [busy, act] = useAct();
  return (
    <Row>
      <Th scope="row">{email}</Th>
      <Td>{courseTitle ? `${role}, ${courseTitle}` : role}</Td>
      <Td>{invitedBy}</Td>
      <Td>{expired ? <Mark tone="open" shape="triangle">expired</Mark> : until}</Td>
      <Td className="text-right whitespace-nowrap">
        <Button
          size="small"
          kind="quiet"
          busy={busy}
          onClick={() => void act(() => resend({ invitationId: id }), `A new link is on its way to ${email}. The old one stopped working.`)}
        >
          Send again<span className="sr-only"> to {email}</span>
        </Button>
        <Button
          size="small"
          kind="quiet"
          busy={busy}
          onClick={() => void act(() => revoke({ invitationId: id }), `The invitation of ${email} is taken back.`)}
        >
          Take back<span className="sr-only"> the invitation of {email}</span>
        </Button>
      </Td>
    </Row>
  );
}
