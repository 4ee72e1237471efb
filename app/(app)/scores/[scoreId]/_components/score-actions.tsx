'use client';

import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button, Dialog, DialogActions, ErrorNote, Field, Input, TextArea, buttonClass, useAnnouncer } from '@/components/ui';
import { changeScoreAction, deleteScoreAction, restoreScoreAction } from '../actions';

export interface ScoreWords {
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly source: string;
  readonly rights: string;
}

interface ScoreActionsProps {
  readonly scoreId: string;
  readonly words: ScoreWords;
  /** The actor may change and delete it. */
  readonly changeable: boolean;
}

export function ScoreActions({ scoreId, words, changeable }: ScoreActionsProps) {
  const [editing, setEditing] = useState(false);
  const remove = useDeleteScore(scoreId, words.title);
  return (
    <>
      <a href={`/api/scores/${scoreId}/file`} download className={buttonClass({ kind: 'plain' })}>Download the file</a>
      {changeable ? (
        <>
          <Button onClick={() => setEditing(true)}>Edit</Button>
          <Button kind="danger" busy={remove.busy} onClick={() => void remove.run()}>Delete</Button>
          <Dialog open={editing} onOpenChange={setEditing} title="About this score" description="Printed under handouts and searched in the library.">
            <EditScore scoreId={scoreId} words={words} onDone={() => setEditing(false)} />
          </Dialog>
        </>
      ) : null}
    </>
  );
}

/** Deletes at once and offers to take it back; says why when something still needs the score. */
function useDeleteScore(scoreId: string, title: string) {
  const router = useRouter();
  const { announce, warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const restore = async () => {
    const answer = await restoreScoreAction({ scoreId }).catch(() => null);
    if (answer?.ok) router.push(`/scores/${scoreId}`);
    else warn(answer ? answer.error.message : 'The server cannot be reached. The score is still deleted.');
  };
  const run = async () => {
    setBusy(true);
    const answer = await deleteScoreAction({ scoreId }).catch(() => null);
    setBusy(false);
    if (!answer?.ok) return warn(answer ? answer.error.message : 'The server cannot be reached. Nothing was deleted.');
    announce(`“${title}” was deleted.`, { label: 'Undo', run: () => void restore() });
    router.push('/library');
  };
  return { busy, run };
}

function EditScore({ scoreId, words, onDone }: { readonly scoreId: string; readonly words: ScoreWords; readonly onDone: () => void }) {
  const { announce } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<{ readonly message: string; readonly fields: Readonly<Record<string, string>> } | null>(null);
  const save = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const text = (name: keyof ScoreWords) => String(form.get(name) ?? '');
    setBusy(true);
    const typed = { title: text('title'), composer: text('composer'), work: text('work'), source: text('source'), rights: text('rights') };
    const answer = await changeScoreAction({ scoreId, ...typed }).catch(() => null);
    setBusy(false);
    if (!answer?.ok) return setProblem({ message: answer?.error.message ?? 'The server cannot be reached. What you typed is still here.', fields: answer?.error.fields ?? {} });
    announce('Saved.');
    onDone();
  };
  const errorOf = (name: keyof ScoreWords) => problem?.fields[name];
  return (
    <form onSubmit={(event) => void save(event)} noValidate className="flex flex-col gap-4">
      {problem && Object.keys(problem.fields).length === 0 ? <ErrorNote>{problem.message}</ErrorNote> : null}
      <Field label="Title" required error={errorOf('title')}><Input name="title" defaultValue={words.title} maxLength={300} /></Field>
      <Field label="Composer" error={errorOf('composer')}><Input name="composer" defaultValue={words.composer} maxLength={300} /></Field>
      <Field label="Work, if it is part of one" error={errorOf('work')}><Input name="work" defaultValue={words.work} maxLength={300} /></Field>
      <Field label="Source" required error={errorOf('source')}><TextArea name="source" defaultValue={words.source} rows={2} maxLength={2000} /></Field>
      <Field label="Rights" required error={errorOf('rights')}><TextArea name="rights" defaultValue={words.rights} rows={2} maxLength={2000} /></Field>
      <DialogActions>
        <Button onClick={onDone}>Leave it</Button>
        <Button kind="primary" type="submit" busy={busy} busyText="Saving">Save</Button>
      </DialogActions>
    </form>
  );
}
