import Link from 'next/link';
import { EmptyState, Mark, Row, Table, Td, Th } from '@/components/ui';
import type { GradebookCell } from '@/db/queries/marks';
import { formatPoints } from '@/lib/marking/points';
import type { Gradebook } from '@/lib/workflows/gradebook';

export function GradebookTable({ gradebook }: { readonly gradebook: Gradebook }) {
  const { assignments, rows } = gradebook;
  if (rows.length === 0) return <EmptyState title="No students yet">Add people to the course first.</EmptyState>;
  if (assignments.length === 0) return <EmptyState title="No marks yet">Open an assignment; what students hand in is listed here.</EmptyState>;
  return (
    <>
      <Table caption="Marks by student">
        <thead>
          <Row>
            <Th>Student</Th>
            {assignments.map(({ id, title }) => (
              <Th key={id} className="text-right">
                <Link href={`/assignments/${id}/marking`} className="link">{title}</Link>
              </Th>
            ))}
            <Th className="text-right">Sum</Th>
            <Th className="text-right">Share</Th>
          </Row>
        </thead>
        <tbody>
          {rows.map(({ student, cells, points, maxPoints }) => (
            <Row key={student.userId}>
              <Th scope="row" className="whitespace-nowrap">{student.name}</Th>
              {cells.map((cell, place) => <Td key={assignments[place]?.id} className="tabular text-right whitespace-nowrap"><Cell cell={cell} /></Td>)}
              <Td className="tabular text-right whitespace-nowrap">{maxPoints > 0 ? `${formatPoints(points)} of ${formatPoints(maxPoints)}` : '–'}</Td>
              <Td className="tabular text-right">{maxPoints > 0 ? `${Math.round((points / maxPoints) * 100)} %` : '–'}</Td>
            </Row>
          ))}
        </tbody>
      </Table>
      <p className="mt-3 text-small text-ink-soft">The sum is of what is marked. <Mark tone="open" shape="ring">not released</Mark> means that the student does not see it yet.</p>
    </>
  );
}

function Cell({ cell }: { readonly cell: GradebookCell | null }) {
  if (!cell) return <span className="text-ink-soft">–</span>;
  const { assignmentId, submissionId, points, maxPoints, state } = cell;
  const words = points === null || maxPoints === null ? 'handed in' : `${formatPoints(points)} of ${formatPoints(maxPoints)}`;
  return (
    <span className="inline-flex items-baseline gap-2">
      {state === 'released' ? null : <Mark tone="open" shape="ring" iconOnly>not released</Mark>}
      <Link href={`/assignments/${assignmentId}/marking?student=${submissionId}`} className="link">{words}</Link>
    </span>
  );
}
