'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { placeOf } from '@/components/marking/place-names';
import { VerdictMark } from '@/components/marking/verdict-mark';
import { Button, Dialog, DialogActions, Row, Table, Td, Th, WarningNote } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import type { MarkChange, Standing } from '@/lib/workflows/mark-again';
import { again } from '../../../../submissions/actions';
import type { MarkedAssignment } from './marking-views';

interface MarkAgainProps {
  readonly assignment: MarkedAssignment;
  readonly changes: readonly MarkChange[];
}

/** The key or the rubric changed after work was marked: what would change, before it does. */
export function MarkAgain({ assignment, changes }: MarkAgainProps) {
  const [open, setOpen] = useState(false);
  const [busy, act] = useAct();
  const words = changes.length === 1 ? 'One mark would change' : `${changes.length} marks would change`;
  const apply = async () => {
    if (await act(() => again({ assignmentId: assignment.id }), 'Marked again.')) setOpen(false);
  };
  return (
    <>
      <WarningNote title="The key or the rubric has changed since this was marked" action={<Button size="small" onClick={() => setOpen(true)}>See what changes</Button>}>
        {words} by the key and rubric of now. Nothing changes until you say so; marks changed by hand stay.
      </WarningNote>
      <Dialog open={open} onOpenChange={setOpen} wide title="Mark again" description="Students whose released marks change get a mail.">
        <div className="max-h-[50vh] overflow-y-auto">
          <Table caption="What would change">
            <thead>
              <Row>
                <Th>Where</Th>
                <Th>Student</Th>
                <Th>Now</Th>
                <Th>Then</Th>
              </Row>
            </thead>
            <tbody>
              {changes.map((change) => (
                <Row key={`${change.startTick} ${change.studentName}`}>
                  <Td>{placeOf(assignment.bars, change.startTick)}</Td>
                  <Td>{change.studentName}</Td>
                  <Td><StandingWords standing={change.before} /></Td>
                  <Td><StandingWords standing={change.after} /></Td>
                </Row>
              ))}
            </tbody>
          </Table>
        </div>
        <DialogActions>
          <Button onClick={() => setOpen(false)}>Leave the marks</Button>
          <Button kind="primary" busy={busy} busyText="Marking again …" onClick={() => void apply()}>Mark again</Button>
        </DialogActions>
      </Dialog>
    </>
  );
}

function StandingWords({ standing }: { readonly standing: Standing | null }) {
  if (!standing) return <span className="text-ink-soft">not asked</span>;
  return (
    <span className="flex flex-wrap items-baseline gap-x-2">
      <VerdictMark verdict={standing.verdict} />
      <span className="tabular whitespace-nowrap">{formatPoints(standing.points)} of {formatPoints(standing.maxPoints)}</span>
    </span>
  );
}
