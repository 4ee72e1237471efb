'use client';

import { useState } from 'react';
import { EmptyState, Field, Input, Row, Select, Table, Td, Th } from '@/components/ui';
import { ROLES, type Role } from '@/lib/vocabularies';
import { changeRole } from '../actions';
import { MemberMenu } from './member-menu';
import { useAct } from './use-act';

export interface MemberRow {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly since: string;
}

interface MemberTableProps {
  readonly members: readonly MemberRow[];
  readonly ownId: string;
}

/** From this many on, a filter helps. */
const MANY = 12;

export function MemberTable({ members, ownId }: MemberTableProps) {
  const [wanted, setWanted] = useState('');
  const shown = members.filter(({ name, email }) => `${name} ${email}`.toLowerCase().includes(wanted.trim().toLowerCase()));
  return (
    <>
      {members.length >= MANY ? (
        <Field label="Find a member" className="mb-3 max-w-sm">
          <Input type="search" value={wanted} onChange={(event) => setWanted(event.target.value)} />
        </Field>
      ) : null}
      {shown.length === 0 ? (
        <EmptyState title="Nobody by that name">Look for a part of the name or of the e-mail.</EmptyState>
      ) : (
        <Members members={shown} ownId={ownId} />
      )}
    </>
  );
}

function Members({ members, ownId }: MemberTableProps) {
  return (
    <Table caption="Members">
      <thead>
        <Row>
          <Th>Name</Th>
          <Th>E-mail</Th>
          <Th>Role</Th>
          <Th>Since</Th>
          <Th><span className="sr-only">Actions</span></Th>
        </Row>
      </thead>
      <tbody>
        {members.map((member) => <MemberLine key={member.userId} member={member} own={member.userId === ownId} />)}
      </tbody>
    </Table>
  );
}

function MemberLine({ member, own }: { readonly member: MemberRow; readonly own: boolean }) {
  const { userId, name, email, role, since } = member;
  const [busy, act] = useAct();
  const change = (next: Role) => act(() => changeRole({ userId, role: next }), `${name} is now ${next}.`);
  return (
    <Row>
      <Th scope="row">{name}{own ? <span className="text-ink-soft"> (you)</span> : null}</Th>
      <Td>{email}</Td>
      <Td>
        <Select
          aria-label={`Role of ${name}`}
          className="w-36"
          value={role}
          disabled={busy}
          onChange={(event) => void change(ROLES.find((choice) => choice === event.target.value) ?? role)}
        >
          {ROLES.map((choice) => <option key={choice}>{choice}</option>)}
        </Select>
      </Td>
      <Td className="whitespace-nowrap">{since}</Td>
      <Td className="text-right"><MemberMenu member={member} own={own} /></Td>
    </Row>
  );
}
