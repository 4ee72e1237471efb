'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { Button, Confirm, useAnnouncer } from '@/components/ui';
import { endSessions } from '../actions';

export function SignOutEverywhere() {
  const [open, setOpen] = useState(false);
  const { warn } = useAnnouncer();
  const run = async () => {
    const outcome = await endSessions({}).catch(() => null);
    if (outcome?.ok) await signOut({ callbackUrl: '/sign-in' });
    else warn(outcome?.error.message ?? 'The server did not answer. You are still signed in everywhere.');
    setOpen(false);
  };
  return (
    <>
      <p className="measure mb-3 text-ink-soft">Left yourself signed in on a computer that is not yours? This ends it.</p>
      <Button onClick={() => setOpen(true)}>Sign out on every device</Button>
      <Confirm
        open={open}
        onOpenChange={setOpen}
        title="Sign out on every device?"
        description="This one too. Work that is saved stays; you sign in again with your password or a link."
        confirm="Sign out everywhere"
        onConfirm={run}
      />
    </>
  );
}
