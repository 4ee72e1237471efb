'use client';

import { type ReactNode, useState } from 'react';
import { Desk, type DeskRules } from '@/components/reading/desk';
import type { SaveState } from '@/components/reading/use-saving';
import { LocalTime } from '@/components/marking/local-time';
import type { PlacedBar } from '@/components/marking/place-names';
import { Button, ButtonLink, Dialog, Mark } from '@/components/ui';
import type { Reading } from '@/lib/harmony/reading';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { SubmissionState } from '@/lib/vocabularies';
import { HandIn } from './hand-in';

interface StudentDeskProps {
  readonly heading: ReactNode;
  readonly submission: { readonly id: string; readonly state: SubmissionState; readonly attempt: number };
  readonly assignment: {
    readonly id: string;
    readonly instructions: string;
    readonly attempts: number;
    readonly dueAt: string | null;
    readonly closesAt: string | null;
    readonly late: boolean;
  };
  /** The assignment still takes this attempt. */
  readonly working: boolean;
  readonly bars: readonly PlacedBar[];
  readonly userId: string;
  readonly readingId: string;
  readonly version: number;
  readonly reading: Reading;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly conventions: ConventionSheet | null;
  readonly rules: DeskRules;
}

/** The desk without proposals: written until it is handed in, then to be read. */
export function StudentDesk(props: StudentDeskProps) {
  const { submission, working, rules, readingId } = props;
  const [saving, setSaving] = useState<SaveState>('saved');
  const base = `/api/readings/${readingId}`;
  return (
    <div className="flex h-[calc(100dvh-var(--spacing-header))] flex-col">
      <Notice {...props} />
      <div className="min-h-0 flex-1">
        <Desk
          key={working ? 'writing' : 'read-only'}
          base={base}
          scoreUrl={`${base}/score`}
          mode={working ? 'answer' : 'feedback'}
          userId={props.userId}
          reading={props.reading}
          version={props.version}
          firstBar={props.firstBar}
          lastBar={props.lastBar}
          sheet={props.conventions ?? DEFAULT_CONVENTIONS}
          rules={rules}
          heading={<Heading {...props} />}
          onSaving={setSaving}
          actions={working ? <HandIn submissionId={submission.id} base={base} saving={saving} rules={rules} bars={props.bars} late={props.assignment.late} lastAttempt={submission.attempt >= props.assignment.attempts} /> : null}
        />
      </div>
    </div>
  );
}

function Heading({ heading, assignment, working }: StudentDeskProps) {
  return (
    <span className="flex min-w-0 items-baseline gap-3">
      {heading}
      {assignment.dueAt && working ? (
        <span className="hidden text-small text-ink-soft sm:inline">{assignment.late ? <Mark tone="eye" shape="triangle">late</Mark> : <>due <LocalTime at={assignment.dueAt} /></>}</span>
      ) : null}
      {assignment.instructions ? <Instructions text={assignment.instructions} /> : null}
    </span>
  );
}

function Instructions({ text }: { readonly text: string }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button size="small" kind="quiet" onClick={() => setOpen(true)}>Instructions</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Instructions">
        <p className="font-book text-lead whitespace-pre-line">{text}</p>
      </Dialog>
    </>
  );
}

/** Why this desk cannot be written on; nothing while it can. */
function Notice({ submission, working, assignment }: StudentDeskProps) {
  if (working) return null;
  const isReleased = submission.state === 'released';
  const words = isReleased
    ? 'This attempt has been marked.'
    : submission.state === 'working'
      ? 'The assignment closed before this was handed in. What you wrote is kept; your instructor can still collect it.'
      : 'Handed in. You can read it here; marks come when your instructor releases them.';
  return (
    <div role="status" className="flex flex-wrap items-baseline gap-x-4 gap-y-1 border-b border-rule bg-bench px-3 py-1.5">
      <Mark tone={submission.state === 'working' ? 'eye' : 'settled'} shape={submission.state === 'working' ? 'triangle' : 'check'} className="whitespace-normal">{words}</Mark>
      {isReleased ? <ButtonLink size="small" href={`/submissions/${submission.id}/feedback`}>See the feedback</ButtonLink> : <ButtonLink size="small" kind="quiet" href={`/assignments/${assignment.id}`}>Back to the assignment</ButtonLink>}
    </div>
  );
}
