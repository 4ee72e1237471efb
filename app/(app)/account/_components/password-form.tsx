'use client';

import Link from 'next/link';
import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { loadPage } from '@/app/_components/load-page';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input, SettledNote } from '@/components/ui';
import { savePassword } from '../actions';

interface PasswordFormProps {
  readonly email: string;
  readonly hasPassword: boolean;
  /** Signed in by a link just now: the old password is not asked for. */
  readonly fresh: boolean;
}

export function PasswordForm({ email, hasPassword, fresh }: PasswordFormProps) {
  const [saved, setSaved] = useState(false);
  const { busy, fields, failure, form } = useSubmit(savePassword, async (value, sent) => {
    await enterAgain(value.email, String(sent.data.get('password')));
    sent.reset();
    setSaved(true);
  });
  if (!hasPassword && !fresh) return <LinkFirst />;
  return (
    <form {...form} className="flex max-w-md flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      {saved && !busy && !failure ? <SettledNote>The new password is saved. Every other device was signed out.</SettledNote> : null}
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      {fresh ? null : (
        <Field label="Password until now" error={fields['current']}>
          <Input name="current" type="password" autoComplete="current-password" required />
        </Field>
      )}
      <Field label="New password" hint="At least 10 characters. Signs you out on every other device." error={fields['password']}>
        <Input name="password" type="password" autoComplete="new-password" required minLength={10} />
      </Field>
      <div>
        <Button type="submit" busy={busy} busyText="Saving …">Save the password</Button>
      </div>
    </form>
  );
}

/** The change ended this session as well: begin a new one, or else go and sign in. */
async function enterAgain(email: string, password: string): Promise<void> {
  const answer = await signIn('password', { email, password, redirect: false }).catch(() => undefined);
  if (!answer?.ok) loadPage('/sign-in');
}

function LinkFirst() {
  return (
    <p className="measure text-ink-soft">
      You have no password here. To choose one, <Link href="/sign-in/link" className="link">sign in by a link to your mailbox</Link> and
      come back.
    </p>
  );
}
