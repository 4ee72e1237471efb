'use client';

import { type FormEvent, useState } from 'react';
import { Button, DialogActions, ErrorNote, Field, Input, TextArea, useAnnouncer } from '@/components/ui';
import { changeExcerptAction } from '../actions';

interface EditExcerptProps {
  readonly excerpt: { readonly id: string; readonly title: string; readonly purpose: string };
  readonly onDone: () => void;
}

const UNREACHED = { message: 'The server cannot be reached. What you typed is still here.', fields: {} };

export function EditExcerpt({ excerpt, onDone }: EditExcerptProps) {
  const { announce } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<{ readonly message: string; readonly fields: Readonly<Record<string, string>> } | null>(null);
  const save = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const words = { title: String(form.get('title') ?? ''), purpose: String(form.get('purpose') ?? '') };
    setBusy(true);
    const answer = await changeExcerptAction({ excerptId: excerpt.id, ...words }).catch(() => null);
    setBusy(false);
    if (!answer?.ok) return setProblem(answer ? { message: answer.error.message, fields: answer.error.fields ?? {} } : UNREACHED);
    announce('Saved.');
    onDone();
  };
  return (
    <form onSubmit={(event) => void save(event)} noValidate className="flex flex-col gap-4">
      {problem && Object.keys(problem.fields).length === 0 ? <ErrorNote>{problem.message}</ErrorNote> : null}
      <Field label="Title" required error={problem?.fields['title']}>
        <Input name="title" defaultValue={excerpt.title} maxLength={300} />
      </Field>
      <Field label="What it is for" error={problem?.fields['purpose']}>
        <TextArea name="purpose" defaultValue={excerpt.purpose} rows={3} maxLength={2000} />
      </Field>
      <DialogActions>
        <Button onClick={onDone}>Leave it</Button>
        <Button kind="primary" type="submit" busy={busy} busyText="Saving">Save</Button>
      </DialogActions>
    </form>
  );
}
