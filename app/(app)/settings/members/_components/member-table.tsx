'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, EmptyState, Field, Input, Row, Select, Table, Td, Th } from '@/components/ui';
import { ROLES, type Role } from '@/lib/vocabularies';
import { changeRole } from '../actions';
import { MemberMenu } from './member-menu';

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
          <Th className="hidden md:table-cell">E-mail</Th>
          <Th>Role</Th>
          <Th className="hidden lg:table-cell">Since</Th>
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
  const { name, email, since } = member;
  return (
    <Row>
      <Th scope="row">
        {name}{own ? <span className="text-ink-soft"> (you)</span> : null}
        <p className="text-small font-normal break-all text-ink-soft md:hidden">{email}</p>
      </Th>
      <Td className="hidden md:table-cell">{email}</Td>
      <Td><RoleChoice member={member} /></Td>
      <Td className="hidden whitespace-nowrap lg:table-cell">{since}</Td>
      <Td className="text-right"><MemberMenu member={member} own={own} /></Td>
    </Row>
  );
}

/** Choosing alone changes nothing: an arrow key in a closed list is pressed too easily for what it would do. */
function RoleChoice({ member }: { readonly member: MemberRow }) {
  const { userId, name, role } = member;
  const [chosen, setChosen] = useState(role);
  const [busy, act] = useAct();
  const save = async () => {
    if (!(await act(() => changeRole({ userId, role: chosen }), `${name} is now ${chosen}.`))) setChosen(role);
  };
  return (
    <span className="flex flex-wrap items-center gap-2">
      <Select
        aria-label={`Role of ${name}`}
        className="w-30 sm:w-36"
        value={chosen}
        disabled={busy}
        onChange={(event) => setChosen(ROLES.find((choice) => choice === event.target.value) ?? role)}
      >
        {ROLES.map((choice) => <option key={choice}>{choice}</option>)}
      </Select>
      {chosen === role ? null : (
        <Button size="small" kind="primary" busy={busy} onClick={() => void save()}>
          Change<span className="sr-only"> the role of {name}</span>
        </Button>
      )}
    </span>
  );
}
