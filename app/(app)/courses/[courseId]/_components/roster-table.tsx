'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, Confirm, EmptyState, Row, Table, Td, Th } from '@/components/ui';
import type { RosterRow } from '@/db/queries/courses';
import { removeFromRoster } from '../../actions';

interface RosterTableProps {
  readonly courseId: string;
  readonly roster: readonly RosterRow[];
  readonly runs: boolean;
  readonly ownId: string;
}

export function RosterTable({ courseId, roster, runs, ownId }: RosterTableProps) {
  const [leaving, setLeaving] = useState<RosterRow | null>(null);
  const [, act] = useAct();
  if (roster.length === 0) return <EmptyState title="Nobody here yet">Paste a list of names and e-mails, or give out a code.</EmptyState>;
  return (
    <>
      <Table caption="Roster">
        <thead>
          <Row>
            <Th>Name</Th>
            <Th className="hidden sm:table-cell">E-mail</Th>
            <Th>In the course</Th>
            {runs ? <Th><span className="sr-only">Remove</span></Th> : null}
          </Row>
        </thead>
        <tbody>
          {roster.map((row) => (
            <Row key={row.userId}>
              <Th scope="row">{row.name}{row.userId === ownId ? <span className="text-ink-soft"> (you)</span> : null}<p className="text-small font-normal break-all text-ink-soft sm:hidden">{row.email}</p></Th>
              <Td className="hidden break-all sm:table-cell">{row.email}</Td>
              <Td>{row.courseRole}</Td>
              {runs ? (
                <Td className="text-right">
                  <Button size="small" kind="quiet" aria-label={`Remove ${row.name}`} onClick={() => setLeaving(row)}>Remove</Button>
                </Td>
              ) : null}
            </Row>
          ))}
        </tbody>
      </Table>
      <Confirm
        open={leaving !== null}
        onOpenChange={() => setLeaving(null)}
        title={`Remove ${leaving?.name ?? ''} from the course?`}
        description="They no longer see it. Their work and marks stay, and are there again if you add them back."
        confirm="Remove from the course"
        onConfirm={async () => {
          if (leaving) await act(() => removeFromRoster({ courseId, userId: leaving.userId }), `${leaving.name} is no longer in the course.`);
          setLeaving(null);
        }}
      />
    </>
  );
}
