'use client';

import { type FormEvent, useId, useState } from 'react';
import { Button, ErrorNote, Mark, SkeletonRows } from '@/components/ui';
import type { Label } from '@/lib/harmony/reading';
import { MentionField } from './mention-field';
import { type Remark, type Remarks, threadsOf } from './use-remarks';

interface RemarksPanelProps {
  readonly remarks: Remarks;
  readonly label: Label;
  /** Index of the bar the label begins in, and its name. */
  readonly barIndex: number;
  readonly place: string;
  /** Raised each time the keyboard asks to write one. */
  readonly focusTurn: number;
  onGoTo(labelId: string): void;
}

/** Threads on the label, then those elsewhere in the reading, and a box for a new one. */
export function RemarksPanel({ remarks, label, barIndex, place, focusTurn, onGoTo }: RemarksPanelProps) {
  const threads = threadsOf(remarks.all);
  const here = threads.filter(({ head }) => head.labelId === label.id || (head.labelId === null && head.barIndex === barIndex));
  const elsewhere = threads.filter((thread) => !here.includes(thread));
  if (remarks.state === 'loading') return <SkeletonRows rows={3} />;
  if (remarks.state === 'failed') return <ErrorNote title="The remarks could not be fetched." action={<Button size="small" onClick={remarks.reload}>Try again</Button>} />;
  return (
    <div className="flex flex-col gap-4">
      {here.length === 0 ? <p className="text-ink-soft">No remark on {place} yet.</p> : null}
      {here.map((thread) => <Thread key={thread.head.id} {...thread} remarks={remarks} />)}
      {remarks.canRemark ? <NewThread key={`${label.id} ${focusTurn}`} autoFocus={focusTurn > 0} label={`A remark on ${place}`} people={remarks.people} onAdd={(body) => remarks.add({ body, labelId: label.id, barIndex })} /> : null}
      {elsewhere.length > 0 ? (
        <details>
          <summary className="caps text-small text-ink-soft">Elsewhere in this reading ({elsewhere.length})</summary>
          <div className="mt-2 flex flex-col gap-3">
            {elsewhere.map(({ head, answers }) => (
              <div key={head.id} className="border-l-2 border-rule pl-2.5">
                <Thread head={head} answers={answers} remarks={remarks} />
                {head.labelId ? <button type="button" className="link min-h-6 text-small" onClick={() => onGoTo(head.labelId as string)}>Go to its label</button> : null}
              </div>
            ))}
          </div>
        </details>
      ) : null}
    </div>
  );
}

function Thread({ head, answers, remarks }: { readonly head: Remark; readonly answers: readonly Remark[]; readonly remarks: Remarks }) {
  const [trouble, setTrouble] = useState<string | null>(null);
  return (
    <article className="flex flex-col gap-2">
      {[head, ...answers].map((remark) => <RemarkView key={remark.id} remark={remark} remarks={remarks} isAnswer={remark !== head} />)}
      {head.resolved ? <Mark tone="settled" shape="check">resolved</Mark> : null}
      {remarks.canRemark ? (
        <div className="flex flex-wrap gap-x-3">
          {head.resolved ? null : <NewThread small label={`Answer ${head.by}`} people={remarks.people} onAdd={(body) => remarks.add({ body, threadId: head.id })} />}
          <button type="button" className="link min-h-6 text-small" onClick={async () => setTrouble(await remarks.change(head.id, { resolved: !head.resolved }))}>
            {head.resolved ? 'Open again' : 'Resolve'}
          </button>
        </div>
      ) : null}
      {trouble ? <p role="alert" className="text-small text-madder">{trouble}</p> : null}
    </article>
  );
}

const WHEN = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });

function RemarkView({ remark, remarks, isAnswer }: { readonly remark: Remark; readonly remarks: Remarks; readonly isAnswer: boolean }) {
  const [rewording, setRewording] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  return (
    <div className={isAnswer ? 'border-l border-rule pl-3' : undefined}>
      <p className="text-small text-ink-soft">
        <span className="font-medium text-ink">{remark.by}</span> · <time dateTime={remark.at}>{WHEN.format(new Date(remark.at))}</time>
        {remark.edited ? ' · reworded' : ''}
      </p>
      {rewording ? (
        <RemarkForm label="Reword" people={remarks.people} start={remark.body} autoFocus onSend={async (body) => {
          const failed = await remarks.change(remark.id, { body });
          if (failed === null) setRewording(false);
          return failed;
        }} onLeave={() => setRewording(false)} />
      ) : <p className="whitespace-pre-wrap break-words">{remark.body}</p>}
      {remark.own && !rewording ? (
        <p className="flex gap-3 text-small">
          <button type="button" className="link min-h-6" onClick={() => setRewording(true)}>Reword</button>
          <button type="button" className="link min-h-6" onClick={async () => setTrouble(await remarks.takeBack(remark.id))}>Take back</button>
        </p>
      ) : null}
      {trouble ? <p role="alert" className="text-small text-madder">{trouble}</p> : null}
    </div>
  );
}

interface NewThreadProps {
  readonly label: string;
  readonly small?: boolean;
  readonly autoFocus?: boolean;
  people(): Promise<readonly string[]>;
  onAdd(body: string): Promise<string | null>;
}

function NewThread({ label, small = false, autoFocus = false, people, onAdd }: NewThreadProps) {
  const [open, setOpen] = useState(!small);
  if (!open) return <button type="button" className="link min-h-6 text-small" onClick={() => setOpen(true)}>Answer</button>;
  const send = async (body: string) => {
    const trouble = await onAdd(body);
    if (trouble === null && small) setOpen(false);
    return trouble;
  };
  return <RemarkForm label={label} people={people} start="" autoFocus={autoFocus || small} onSend={send} onLeave={small ? () => setOpen(false) : undefined} />;
}

interface RemarkFormProps {
  readonly label: string;
  readonly start: string;
  readonly autoFocus?: boolean;
  people(): Promise<readonly string[]>;
  onSend(body: string): Promise<string | null>;
  onLeave?: (() => void) | undefined;
}

function RemarkForm({ label, start, autoFocus = false, people, onSend, onLeave }: RemarkFormProps) {
  const [body, setBody] = useState(start);
  const [busy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const id = useId();
  const submit = async (event?: FormEvent) => {
    event?.preventDefault();
    if (body.trim() === '' || busy) return;
    setBusy(true);
    const failed = await onSend(body);
    setBusy(false);
    setTrouble(failed);
    if (failed === null) setBody('');
  };
  return (
    <form onSubmit={submit} className="flex w-full flex-col gap-1.5">
      <label htmlFor={id} className="text-small">{label}</label>
      <MentionField id={id} rows={2} value={body} autoFocus={autoFocus} maxLength={4000} findPeople={people} onChange={setBody} onKeyDown={(event) => {
        if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) void submit();
      }} />
      {trouble ? <p role="alert" className="text-small text-madder">{trouble}</p> : null}
      <span className="flex gap-2">
        <Button type="submit" size="small" busy={busy} disabled={body.trim() === ''}>Send</Button>
        {onLeave ? <Button size="small" kind="quiet" onClick={onLeave}>Leave</Button> : null}
      </span>
    </form>
  );
}
