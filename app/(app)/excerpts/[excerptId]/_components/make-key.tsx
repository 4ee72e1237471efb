'use client';

import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button, Dialog, DialogActions, ErrorNote, Field, Input } from '@/components/ui';
import { makeAnswerKeyAction } from '../actions';

interface MakeKeyProps {
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly reading: { readonly id: string; readonly title: string; readonly open: number };
}

/** Copies a reading into an answer key. The reading itself stays as it is and can go on changing. */
export function MakeKey({ excerptId, excerptTitle, reading }: MakeKeyProps) {
  const router = useRouter();
  const [shown, setShown] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const make = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const title = String(new FormData(event.currentTarget).get('title') ?? '');
    setBusy(true);
    const answer = await makeAnswerKeyAction({ excerptId, basedOn: reading.id, title }).catch(() => null);
    if (answer?.ok) return router.push(`/desk/${answer.value.readingId}`);
    setBusy(false);
    return setProblem(answer ? (answer.error.fields?.['title'] ?? answer.error.message) : 'The server cannot be reached. Try again.');
  };
  return (
    <>
      <Button size="small" onClick={() => setShown(true)}>Make a key</Button>
      <Dialog
        open={shown}
        onOpenChange={setShown}
        title="Make an answer key"
        description={`A copy of “${reading.title}” that assignments are marked against. In the assignment you say which other answers are right.`}
      >
        <form onSubmit={(event) => void make(event)} noValidate className="flex flex-col gap-4">
          {problem ? <ErrorNote>{problem}</ErrorNote> : null}
          {reading.open > 0 ? (
            <p className="text-ochre">{reading.open === 1 ? 'One label is' : `${reading.open} labels are`} still only suggested; they come into the key as they stand.</p>
          ) : null}
          <Field label="Title" required>
            <Input name="title" defaultValue={`Key: ${excerptTitle}`.slice(0, 300)} maxLength={300} />
          </Field>
          <DialogActions>
            <Button onClick={() => setShown(false)}>Leave it</Button>
            <Button kind="primary" type="submit" busy={busy} busyText="Copying">Make the key</Button>
          </DialogActions>
        </form>
      </Dialog>
    </>
  );
}
