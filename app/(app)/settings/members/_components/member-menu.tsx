'use client';

import { useState } from 'react';
import { loadPage } from '@/app/_components/load-page';
import { useAct } from '@/app/_components/use-act';
import { Button, Confirm, Menu, MenuAction, MenuRule } from '@/components/ui';
import { erase, remove } from '../actions';
import type { MemberRow } from './member-table';

type Asked = 'remove' | 'erase' | null;

/** What an owner can do with a member beside the role. */
export function MemberMenu({ member, own }: { readonly member: MemberRow; readonly own: boolean }) {
  const [asked, setAsked] = useState<Asked>(null);
  const download = () => loadPage(`/settings/members/${member.userId}/export`);
  return (
    <>
      <Menu trigger={<Button kind="quiet" size="small" aria-label={`More about ${member.name}`}>More</Button>}>
        <MenuAction onSelect={download}>Download their data</MenuAction>
        <MenuRule />
        <MenuAction danger onSelect={() => setAsked('remove')}>Remove from the department …</MenuAction>
        {own ? null : <MenuAction danger onSelect={() => setAsked('erase')}>Delete their data …</MenuAction>}
      </Menu>
      <RemoveMember member={member} open={asked === 'remove'} close={() => setAsked(null)} />
      <EraseMember member={member} open={asked === 'erase'} close={() => setAsked(null)} />
    </>
  );
}

interface AskProps {
  readonly member: MemberRow;
  readonly open: boolean;
  readonly close: () => void;
}

function RemoveMember({ member, open, close }: AskProps) {
  const { userId, name } = member;
  const [, act] = useAct();
  return (
    <Confirm
      open={open}
      onOpenChange={close}
      title={`Remove ${name}?`}
      description="They lose access to the department and its courses at once. What they made stays, under their name. You can invite them again."
      confirm={`Remove ${name}`}
      onConfirm={async () => {
        await act(() => remove({ userId }), `${name} was removed.`);
        close();
      }}
    />
  );
}

function EraseMember({ member, open, close }: AskProps) {
  const { userId, name } = member;
  const [, act] = useAct();
  return (
    <Confirm
      open={open}
      onOpenChange={close}
      title={`Delete the data of ${name}?`}
      description="Their account, private readings and unfinished work are deleted for good. What they handed in and what others build on stays, without their name."
      confirm="Delete for good"
      onConfirm={async () => {
        await act(() => erase({ userId }), `The data of ${name} is deleted.`);
        close();
      }}
    />
  );
}
