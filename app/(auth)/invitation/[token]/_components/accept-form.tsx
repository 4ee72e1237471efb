'use client';

import { signIn } from 'next-auth/react';
import { loadPage } from '@/app/_components/load-page';
import { type Sent, useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input } from '@/components/ui';
import { accept } from '../actions';

interface AcceptFormProps {
  readonly token: string;
  readonly email: string;
  /** The person has an account already. */
  readonly known: boolean;
}

/** Someone new is signed in at once; someone known goes to sign in as they always do. */
async function enter({ email, known }: { readonly email: string; readonly known: boolean }, { data }: Sent): Promise<void> {
  const answer = known ? null : await signIn('password', { email, password: data.get('password'), redirect: false });
  loadPage(answer?.ok ? '/' : '/sign-in');
}

export function AcceptForm({ token, email, known }: AcceptFormProps) {
  const { outcome, busy, fields, failure, form } = useSubmit(accept, enter);
  return (
    <form {...form} className="flex flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <input type="hidden" name="token" value={token} />
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      {known ? (
        <p className="text-ink-soft">You have an account with this e-mail. Accept, then sign in with it as you always do.</p>
      ) : (
        <NewPersonFields fields={fields} />
      )}
      <Button type="submit" kind="primary" busy={busy || outcome?.ok === true} busyText="Accepting …">Accept the invitation</Button>
    </form>
  );
}

function NewPersonFields({ fields }: { readonly fields: Readonly<Record<string, string>> }) {
  return (
    <>
      <Field label="Your name" hint="As your teachers and classmates know you." error={fields['name']}>
        <Input name="name" autoComplete="name" required autoFocus maxLength={120} />
      </Field>
      <Field label="Choose a password" hint="At least 10 characters; a few words make a good one." error={fields['password']}>
        <Input name="password" type="password" autoComplete="new-password" required minLength={10} />
      </Field>
    </>
  );
}
