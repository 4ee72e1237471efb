'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, Checkbox, Dialog, DialogActions, WarningNote } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import { release } from '../../../../submissions/actions';
import type { StudentView } from './marking-views';

interface ReleaseMarksProps {
  readonly assignmentId: string;
  readonly students: readonly StudentView[];
}

/** Chooses who sees their marks now; each gets a mail with a link and no mark in it. */
export function ReleaseMarks({ assignmentId, students }: ReleaseMarksProps) {
  const [open, setOpen] = useState(false);
  const waiting = students.filter((student) => student.state !== 'released');
  if (waiting.length === 0) return <p className="self-center text-small text-verdigris">All marks are released.</p>;
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>Release marks</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Release marks" description="From then on each student sees their own verdicts, points and remarks, and gets a mail with the link.">
        {open ? <ReleaseForm assignmentId={assignmentId} waiting={waiting} close={() => setOpen(false)} /> : null}
      </Dialog>
    </>
  );
}

function ReleaseForm({ assignmentId, waiting, close }: { readonly assignmentId: string; readonly waiting: readonly StudentView[]; readonly close: () => void }) {
  const [chosen, setChosen] = useState<ReadonlySet<string>>(new Set(waiting.map((student) => student.submissionId)));
  const [busy, act] = useAct();
  const open = waiting.filter((student) => chosen.has(student.submissionId) && student.settled < student.answers.length);
  const toggle = (id: string) => {
    const next = new Set(chosen);
    if (!next.delete(id)) next.add(id);
    setChosen(next);
  };
  const send = async () => {
    if (await act(() => release({ assignmentId, submissionIds: [...chosen] }), 'Released. The mails are on their way.')) close();
  };
  return (
    <div className="flex flex-col gap-3">
      {waiting.length > 1 ? (
        <Checkbox
          label={`All (${waiting.length})`}
          checked={chosen.size === waiting.length}
          onChange={(event) => setChosen(new Set(event.target.checked ? waiting.map((student) => student.submissionId) : []))}
        />
      ) : null}
      <ul className="max-h-[45vh] divide-y divide-rule overflow-y-auto border-y border-rule py-1">
        {waiting.map((student) => (
          <li key={student.submissionId} className="flex items-baseline justify-between gap-4 py-0.5">
            <Checkbox label={student.name} checked={chosen.has(student.submissionId)} onChange={() => toggle(student.submissionId)} />
            <span className="tabular text-small text-ink-soft">{formatPoints(student.points)} of {formatPoints(student.maxPoints)}</span>
          </li>
        ))}
      </ul>
      {open.length > 0 ? <WarningNote>{open.length === 1 ? 'One of them has' : `${open.length} of them have`} answers that nobody has looked at; they are released as proposed.</WarningNote> : null}
      <DialogActions>
        <Button onClick={close}>Not yet</Button>
        <Button kind="primary" busy={busy} busyText="Releasing …" disabled={chosen.size === 0} onClick={() => void send()}>Release {chosen.size}</Button>
      </DialogActions>
    </div>
  );
}
