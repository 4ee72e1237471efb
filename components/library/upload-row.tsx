'use client';

import Link from 'next/link';
import { Button, Field, Input, Progress, Spinner, StateMark } from '@/components/ui';
import { formatBytes } from './check-file';
import type { Upload, UploadEvent } from './uploads';

interface UploadRowProps {
  readonly upload: Upload;
  readonly dispatch: (event: UploadEvent) => void;
}

/** One file on its way: its name, what it will be called, where it stands and what can be done. */
export function UploadRow({ upload, dispatch }: UploadRowProps) {
  const { id, file, stage } = upload;
  const removable = stage !== 'sending' && stage !== 'queued';
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-4 gap-y-2 border-t border-rule py-3 first:border-t-0 lg:grid-cols-[minmax(0,15rem)_minmax(0,1fr)_auto]">
      <div className="min-w-0">
        <p className="font-medium break-words">{file.name}</p>
        <p className="text-small text-ink-soft">{formatBytes(file.size)}</p>
      </div>
      <div className="order-last col-span-2 min-w-0 lg:order-none lg:col-span-1">
        {stage === 'asking' ? <WordsOfUpload upload={upload} dispatch={dispatch} /> : <StandOfUpload upload={upload} dispatch={dispatch} />}
      </div>
      {removable ? (
        <Button kind="quiet" size="small" onClick={() => dispatch({ kind: 'removed', id })} aria-label={`Take ${file.name} off this list`}>
          Remove
        </Button>
      ) : (
        <span />
      )}
    </li>
  );
}

function WordsOfUpload({ upload, dispatch }: UploadRowProps) {
  const { id, file } = upload;
  const typed = (words: Partial<Pick<Upload, 'title' | 'composer' | 'work'>>) => dispatch({ kind: 'typed', id, words });
  return (
    <div className="grid gap-x-3 gap-y-2 sm:grid-cols-3" role="group" aria-label={`About ${file.name}`}>
      <Field label="Title">
        <Input value={upload.title} maxLength={300} onChange={(event) => typed({ title: event.target.value })} />
      </Field>
      <Field label="Composer">
        <Input value={upload.composer} maxLength={300} onChange={(event) => typed({ composer: event.target.value })} />
      </Field>
      <Field label="Work (if it is part of one)">
        <Input value={upload.work} maxLength={300} onChange={(event) => typed({ work: event.target.value })} />
      </Field>
    </div>
  );
}

function StandOfUpload({ upload, dispatch }: UploadRowProps) {
  const { file, stage, sent, title, scoreId } = upload;
  switch (stage) {
    case 'looking':
      return <p className="flex items-center gap-2 text-ochre"><Spinner label="" />Looking into the file</p>;
    case 'queued':
      return <StateMark state="waiting">waits for its turn</StateMark>;
    case 'sending':
      return (
        <div className="pt-1">
          <Progress value={sent} max={file.size} label={`Sending ${file.name}`} />
          <p className="mt-1 text-small text-ink-soft tabular">{formatBytes(sent)} of {formatBytes(file.size)} sent</p>
        </div>
      );
    case 'waiting':
      return <StateMark state="working">stored, now being read</StateMark>;
    case 'ready':
      return (
        <p className="flex flex-wrap items-baseline gap-x-4">
          <StateMark state="ready">in the library</StateMark>
          <Link href={`/scores/${scoreId ?? ''}`} className="link">{title}</Link>
        </p>
      );
    default:
      return <ProblemOfUpload upload={upload} dispatch={dispatch} />;
  }
}

const WORD = { refused: 'not taken', failed: 'not sent', existing: 'there already' } as const;

function ProblemOfUpload({ upload, dispatch }: UploadRowProps) {
  const { id, file, stage, problem, place, scoreId } = upload;
  if (stage !== 'refused' && stage !== 'failed' && stage !== 'existing') return null;
  return (
    <div role="alert">
      <StateMark state={stage === 'existing' ? 'closed' : stage}>{WORD[stage]}</StateMark>
      <p><span className="sr-only">{file.name}: </span>{problem}</p>
      {place && !problem?.includes(place) ? <p className="text-small text-ink-soft">At {place}.</p> : null}
      {scoreId ? <Link href={`/scores/${scoreId}`} className="link">Open the score</Link> : null}
      {stage === 'failed' ? (
        <Button size="small" className="mt-1" onClick={() => dispatch({ kind: 'retried', id })}>Try again</Button>
      ) : null}
    </div>
  );
}
