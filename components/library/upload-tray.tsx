'use client';

import { type FormEvent, useId, useState } from 'react';
import { Button, Field, Input } from '@/components/ui';
import { UploadRow } from './upload-row';
import type { Upload, UploadEvent } from './uploads';
import type { Statements } from './use-uploads';

const RIGHTS = [
  'Public domain',
  'Public domain; this edition was made by the department',
  'CC0 1.0',
  'CC BY 4.0',
  'CC BY-SA 4.0',
  'Used by permission of the publisher, within the department only',
];

interface UploadTrayProps {
  readonly uploads: readonly Upload[];
  readonly dispatch: (event: UploadEvent) => void;
  readonly statements: Statements;
  readonly onStatements: (statements: Statements) => void;
}

/** The chosen files with what is asked about them, and then how each fares. One that fails holds up no other. */
export function UploadTray({ uploads, dispatch, statements, onStatements }: UploadTrayProps) {
  const asking = uploads.filter(({ stage }) => stage === 'asking').length;
  const settled = uploads.filter(({ stage }) => stage === 'ready' || stage === 'refused' || stage === 'existing');
  const [errors, setErrors] = useState<Partial<Statements>>({});
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const missing = checkStatements(statements);
    setErrors(missing);
    if (Object.keys(missing).length === 0) dispatch({ kind: 'submitted' });
  };
  if (uploads.length === 0) return null;
  return (
    <form onSubmit={submit} noValidate aria-label="Files to bring in" className="mb-8 border-y border-rule-strong bg-sheet px-4 pb-4">
      <ol>{uploads.map((upload) => <UploadRow key={upload.id} upload={upload} dispatch={dispatch} />)}</ol>
      {asking > 0 ? <StatementsOfAll count={asking} statements={statements} errors={errors} onStatements={onStatements} /> : null}
      <div className="mt-3 flex flex-wrap gap-2">
        {asking > 0 ? <Button kind="primary" type="submit">{asking === 1 ? 'Add the score to the library' : `Add ${asking} scores to the library`}</Button> : null}
        {settled.length > 0 ? (
          <Button kind="quiet" onClick={() => settled.forEach(({ id }) => dispatch({ kind: 'removed', id }))}>Clear what is done</Button>
        ) : null}
      </div>
    </form>
  );
}

function checkStatements({ source, rights }: Statements): Partial<Statements> {
  return {
    ...(source.trim() ? {} : { source: 'Say where the file comes from: the edition, or who encoded it.' }),
    ...(rights.trim() ? {} : { rights: 'Say what allows its use, for instance that it is in the public domain.' }),
  };
}

interface StatementsProps {
  readonly count: number;
  readonly statements: Statements;
  readonly errors: Partial<Statements>;
  readonly onStatements: (statements: Statements) => void;
}

function StatementsOfAll({ count, statements, errors, onStatements }: StatementsProps) {
  const listId = useId();
  const hint = count === 1 ? 'Printed under handouts' : `For all ${count}; each can be changed later. Printed under handouts`;
  return (
    <div className="grid gap-4 border-t border-rule pt-3 md:grid-cols-2">
      <Field label="Source" required hint={hint} error={errors.source}>
        <Input
          value={statements.source}
          maxLength={2000}
          placeholder="First edition, 1846; encoded by the department"
          onChange={(event) => onStatements({ ...statements, source: event.target.value })}
        />
      </Field>
      <Field label="Rights" required hint="What allows its use" error={errors.rights}>
        <Input
          value={statements.rights}
          maxLength={2000}
          list={listId}
          placeholder="Public domain"
          onChange={(event) => onStatements({ ...statements, rights: event.target.value })}
        />
      </Field>
      <datalist id={listId}>{RIGHTS.map((statement) => <option key={statement} value={statement} />)}</datalist>
    </div>
  );
}
