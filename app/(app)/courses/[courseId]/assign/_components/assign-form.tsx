'use client';

import { useRouter } from 'next/navigation';
import { useMemo, useState, useTransition } from 'react';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, Choices, EmptyState, ErrorNote, Field, Input, Radio } from '@/components/ui';
import { LocalTime } from '@/components/marking/local-time';
import type { KeySource } from '@/db/queries/assignments';
import { createAssignment } from '../../../../assignments/actions';
import { ExcerptList, excerptsOf } from './excerpt-list';

export type Source = Omit<KeySource, 'updatedAt'> & { readonly changed: string };

interface AssignFormProps {
  readonly courseId: string;
  readonly readings: readonly Source[];
  readonly excerptId?: string;
}

/** An excerpt, a reading of it to mark against, a title. */
export function AssignForm({ courseId, readings, excerptId }: AssignFormProps) {
  const router = useRouter();
  const [leaving, leave] = useTransition();
  const excerpts = useMemo(() => excerptsOf(readings), [readings]);
  const [chosen, setChosen] = useState(excerpts.find((one) => one.excerptId === excerptId)?.excerptId ?? '');
  const [typed, setTyped] = useState<string | null>(null);
  const { busy, fields, failure, onSubmit } = useSubmit(createAssignment, ({ assignmentId }) => leave(() => router.push(`/assignments/${assignmentId}`)));
  const excerpt = excerpts.find((one) => one.excerptId === chosen);
  const title = typed ?? excerpt?.excerptTitle ?? '';
  return (
    <form onSubmit={onSubmit} className="grid gap-x-12 gap-y-8 lg:grid-cols-2">
      <input type="hidden" name="courseId" value={courseId} />
      <input type="hidden" name="excerptId" value={chosen} />
      <ExcerptList excerpts={excerpts} chosen={chosen} onChoose={setChosen} />
      <div className="flex flex-col gap-5">
        {failure ? <ErrorNote>{failure}</ErrorNote> : null}
        {excerpt ? (
          <>
            <ReadingChoice key={chosen} readings={readings.filter((reading) => reading.excerptId === chosen)} />
            <Field label="Title of the assignment" error={fields['title']} required>
              <Input name="title" value={title} onChange={(event) => setTyped(event.target.value)} maxLength={300} autoComplete="off" />
            </Field>
            <p className="measure text-small text-ink-soft">
              It begins as a draft that asks every label. Next you choose what is asked, how it is marked, and when it opens.
            </p>
            <div><Button type="submit" kind="primary" busy={busy || leaving} busyText="Making the draft …">Make the draft</Button></div>
          </>
        ) : (
          <EmptyState title="Choose an excerpt">Its readings are shown here then: one of them becomes the answer key.</EmptyState>
        )}
      </div>
    </form>
  );
}

/** A key as it is; of any other reading a key is made, so that later changes of the reading change no marks. */
function ReadingChoice({ readings }: { readonly readings: readonly Source[] }) {
  const first = readings.find((reading) => reading.kind === 'key') ?? readings.find((reading) => reading.kind === 'person') ?? readings[0];
  return (
    <Choices legend="Mark against">
      {readings.map((reading) => (
        <Radio
          key={reading.readingId}
          name="readingId"
          value={reading.readingId}
          defaultChecked={reading.readingId === first?.readingId}
          label={reading.title}
          hint={<>{wordsOf(reading)}, last changed <LocalTime at={reading.changed} time={false} /></>}
        />
      ))}
    </Choices>
  );
}

function wordsOf({ kind, ownerName }: Source): string {
  if (kind === 'key') return `answer key${ownerName ? ` by ${ownerName}` : ''}: taken as it is`;
  if (kind === 'engine') return 'the program’s proposal: a key is made of it, look at every label before you open';
  return `reading${ownerName ? ` by ${ownerName}` : ''}: a key is made of it`;
}
