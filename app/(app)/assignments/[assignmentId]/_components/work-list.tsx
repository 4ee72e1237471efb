'use client';

import Link from 'next/link';
import { useAct } from '@/app/_components/use-act';
import { LocalTime } from '@/components/marking/local-time';
import { WorkStateMark } from '@/components/marking/work-state';
import { Button, EmptyState, Mark, Row, Table, Td, Th, WarningNote } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import type { SubmissionState } from '@/lib/vocabularies';
import { collect } from '../../../submissions/actions';
import type { EditedAssignment } from './edited-assignment';

export interface WorkRow {
  readonly id: string;
  readonly studentId: string;
  readonly studentName: string;
  readonly attempt: number;
  readonly state: SubmissionState;
  readonly handedInAt: string | null;
  readonly points: number | null;
  readonly maxPoints: number | null;
}

interface WorkListProps {
  readonly assignment: EditedAssignment;
  readonly students: readonly { readonly userId: string; readonly name: string }[];
  readonly submissions: readonly WorkRow[];
  readonly runs: boolean;
  readonly over: boolean;
}

/** Every student of the course with every attempt, those who have not begun too. */
export function WorkList({ assignment, students, submissions, runs, over }: WorkListProps) {
  const known = new Set(submissions.map((row) => row.studentId));
  const missing = students.filter((student) => !known.has(student.userId));
  const left = submissions.filter((row) => row.state === 'working').length;
  if (students.length === 0 && submissions.length === 0) {
    return <EmptyState title="No students yet">Add them to the course: each finds the assignment under “My work”.</EmptyState>;
  }
  return (
    <>
      {runs && over && left > 0 ? <Collect assignmentId={assignment.id} left={left} /> : null}
      <Table caption="Work of the students">
        <thead>
          <Row>
            <Th>Student</Th>
            <Th>State</Th>
            <Th className="hidden text-right sm:table-cell">Attempt</Th>
            <Th className="hidden sm:table-cell">Handed in</Th>
            <Th className="text-right">Points</Th>
          </Row>
        </thead>
        <tbody>
          {submissions.map((row) => <WorkLine key={row.id} row={row} assignment={assignment} />)}
          {missing.map((student) => (
            <Row key={student.userId}>
              <Th scope="row">{student.name}</Th>
              <Td><WorkStateMark state={null} /></Td>
              <Td className="hidden text-right sm:table-cell">–</Td>
              <Td className="hidden sm:table-cell">–</Td>
              <Td className="text-right">–</Td>
            </Row>
          ))}
        </tbody>
      </Table>
    </>
  );
}

function WorkLine({ row, assignment }: { readonly row: WorkRow; readonly assignment: EditedAssignment }) {
  const { studentName, state, attempt, handedInAt, points, maxPoints } = row;
  const late = handedInAt !== null && assignment.dueAt !== null && handedInAt > assignment.dueAt;
  return (
    <Row>
      <Th scope="row">
        {state === 'working' ? studentName : <Link href={`/assignments/${assignment.id}/marking?student=${row.id}`} className="link">{studentName}</Link>}
        {handedInAt ? <p className="text-small font-normal text-ink-soft sm:hidden"><LocalTime at={handedInAt} />{late ? ', late' : ''}</p> : null}
      </Th>
      <Td><WorkStateMark state={state} /></Td>
      <Td className="tabular hidden text-right sm:table-cell">{attempt}</Td>
      <Td className="hidden sm:table-cell">
        <span className="flex flex-wrap items-baseline gap-x-2">
          {handedInAt ? <LocalTime at={handedInAt} /> : '–'}
          {late ? <Mark tone="eye" shape="triangle">late</Mark> : null}
        </span>
      </Td>
      <Td className="tabular text-right whitespace-nowrap">{points === null || maxPoints === null ? '–' : `${formatPoints(points)} of ${formatPoints(maxPoints)}`}</Td>
    </Row>
  );
}

function Collect({ assignmentId, left }: { readonly assignmentId: string; readonly left: number }) {
  const [busy, act] = useAct();
  return (
    <WarningNote
      className="mb-4"
      action={<Button size="small" busy={busy} onClick={() => void act(() => collect({ assignmentId }), 'Collected: it is handed in as it stood.')}>Collect it</Button>}
    >
      {left === 1 ? 'One student had begun and not handed in.' : `${left} students had begun and not handed in.`} Their work is kept as it stood.
    </WarningNote>
  );
}
