'use client';

import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input, Select, useAnnouncer } from '@/components/ui';
import { ROLES } from '@/lib/vocabularies';
import { invite } from '../actions';

export function InviteForm() {
  const { announce } = useAnnouncer();
  const { busy, fields, failure, form } = useSubmit(invite, (_value, sent) => {
    sent.reset();
    announce('The invitation is on its way by mail. It works for two weeks.');
  });
  return (
    <form {...form} className="flex flex-col gap-3">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <div className="flex flex-wrap items-start gap-3">
        <Field label="E-mail" error={fields['email']} className="min-w-64 flex-1">
          <Input name="email" type="email" autoComplete="off" required />
        </Field>
        <Field label="Role" error={fields['role']} className="w-44">
          <Select name="role" defaultValue="instructor">
            {ROLES.map((role) => <option key={role}>{role}</option>)}
          </Select>
        </Field>
        <Button type="submit" kind="primary" busy={busy} busyText="Inviting …" className="mt-[1.6rem]">Invite</Button>
      </div>
      <p className="measure text-micro text-ink-soft">
        Students are usually invited from their course, which puts them into it as well.
      </p>
    </form>
  );
}
