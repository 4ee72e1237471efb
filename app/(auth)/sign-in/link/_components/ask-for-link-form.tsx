'use client';

import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input, SettledNote } from '@/components/ui';
import { askForLink } from '../actions';

export function AskForLinkForm() {
  const { outcome, busy, fields, failure, form } = useSubmit(askForLink);
  if (outcome?.ok) return <LinkSent email={outcome.value.email} />;
  return (
    <form {...form} className="flex flex-col gap-4">
      <p className="text-ink-soft">We send a link to your mailbox. It signs you in once; then you can choose a new password.</p>
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <Field label="E-mail" error={fields['email']}>
        <Input name="email" type="email" autoComplete="username" required autoFocus />
      </Field>
      <Button type="submit" kind="primary" busy={busy} busyText="Sending …">Send me a link</Button>
    </form>
  );
}

function LinkSent({ email }: { readonly email: string }) {
  return (
    <SettledNote title="Look into your mailbox">
      If someone here has the e-mail {email}, a link is on its way. It works for 20 minutes. Nothing there? Look among the
      unwanted mail, and check that this is the e-mail you were invited with.
    </SettledNote>
  );
}
