'use client';

import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input, Select, useAnnouncer } from '@/components/ui';
import { PAPERS, type Paper } from '@/lib/vocabularies';
import { saveDepartment } from '../actions';

export function DepartmentForm({ name, paper }: { readonly name: string; readonly paper: Paper }) {
  const { announce } = useAnnouncer();
  const { busy, fields, failure, form } = useSubmit(saveDepartment, () => announce('The settings are saved.'));
  return (
    <form {...form} className="flex max-w-xl flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <Field label="Name" error={fields['name']}>
        <Input name="name" defaultValue={name} required maxLength={120} />
      </Field>
      <Field label="Paper" hint="What a new handout is laid out for." error={fields['paper']}>
        <Select name="paper" defaultValue={paper}>
          {PAPERS.map((choice) => <option key={choice}>{choice}</option>)}
        </Select>
      </Field>
      <div>
        <Button type="submit" kind="primary" busy={busy}>Save</Button>
      </div>
    </form>
  );
}
