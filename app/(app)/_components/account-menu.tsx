'use client';

import { signOut } from 'next-auth/react';
import { Button, Menu, MenuAction, MenuHeading, MenuLink, MenuRule } from '@/components/ui';

interface AccountMenuProps {
  readonly name: string;
  readonly role: string;
}

export function AccountMenu({ name, role }: AccountMenuProps) {
  return (
    <Menu
      trigger={
        <Button kind="quiet" size="icon" aria-label={`Account of ${name}`}>
          <span aria-hidden="true" className="flex size-7 items-center justify-center rounded-full border border-rule-strong font-book text-small">
            {initialsOf(name)}
          </span>
        </Button>
      }
    >
      <MenuHeading>{name}, {role}</MenuHeading>
      <MenuRule />
      <MenuLink href="/account">Account</MenuLink>
      <MenuAction onSelect={() => void signOut({ callbackUrl: '/sign-in' })}>Sign out</MenuAction>
    </Menu>
  );
}

/** First letters of the first and the last name. */
function initialsOf(name: string): string {
  const words = name.split(/\s+/).filter(Boolean);
  const ends = words.length > 1 ? [words[0], words[words.length - 1]] : words;
  return ends.map((word) => [...(word ?? '')][0] ?? '').join('').toUpperCase();
}
