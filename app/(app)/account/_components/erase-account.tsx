'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, Dialog, DialogActions, ErrorNote, Field, Input } from '@/components/ui';
import { eraseAccount } from '../actions';

interface EraseAccountProps {
  readonly hasPassword: boolean;
  readonly fresh: boolean;
}

export function EraseAccount({ hasPassword, fresh }: EraseAccountProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <p className="measure mb-3 text-ink-soft">
        Deletes your name, e-mail, password and memberships, your private readings, and work you have not handed in. What
        you handed in stays in the course’s results without your name, and so do readings and remarks you shared.
      </p>
      <Button kind="danger" onClick={() => setOpen(true)}>Delete my account …</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Delete the account for good?" description="This cannot be taken back. You may want to download your data first.">
        <EraseForm asksPassword={hasPassword && !fresh} close={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function EraseForm({ asksPassword, close }: { readonly asksPassword: boolean; readonly close: () => void }) {
  const { busy, fields, failure, form } = useSubmit(eraseAccount, () => signOut({ callbackUrl: '/sign-in' }));
  return (
    <form {...form} className="flex flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      {asksPassword ? (
        <Field label="Your password" error={fields['current']}>
          <Input name="current" type="password" autoComplete="current-password" required />
        </Field>
      ) : null}
      <DialogActions>
        <Button onClick={close}>Keep it</Button>
        <Button type="submit" kind="danger" busy={busy} busyText="Deleting …">Delete my account and data</Button>
      </DialogActions>
    </form>
  );
}
