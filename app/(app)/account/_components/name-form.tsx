'use client';

import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input, useAnnouncer } from '@/components/ui';
import { saveName } from '../actions';

export function NameForm({ name }: { readonly name: string }) {
  const { announce } = useAnnouncer();
  const { busy, fields, failure, form } = useSubmit(saveName, () => announce('Your name is saved.'));
  return (
    <form {...form} className="flex flex-col gap-3">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <div className="flex flex-wrap items-end gap-3">
        <Field label="Name" error={fields['name']} className="min-w-64 flex-1">
          <Input name="name" autoComplete="name" defaultValue={name} required maxLength={120} />
        </Field>
        <Button type="submit" busy={busy}>Save</Button>
      </div>
    </form>
  );
}
