import Link from 'next/link';
import { LocalTime } from '@/components/marking/local-time';
import { AssignmentStateMark } from '@/components/marking/work-state';
import { ButtonLink, EmptyState, Row, Table, Td, Th } from '@/components/ui';
import type { ListedAssignment } from '@/db/queries/assignments';

interface AssignmentTableProps {
  readonly assignments: readonly ListedAssignment[];
  readonly courseId: string;
  readonly prepares: boolean;
}

export function AssignmentTable({ assignments, courseId, prepares }: AssignmentTableProps) {
  if (assignments.length === 0) {
    return (
      <EmptyState
        title="Nothing set yet"
        action={prepares ? <ButtonLink kind="primary" href={`/courses/${courseId}/assign`}>New assignment</ButtonLink> : null}
      >
        An assignment takes an excerpt of the library and a reading of it as the key. Students see the score and write the labels.
      </EmptyState>
    );
  }
  return (
    <Table caption="Assignments">
      <thead>
        <Row>
          <Th>Assignment</Th>
          <Th>State</Th>
          <Th className="hidden sm:table-cell">Due</Th>
          <Th className="hidden text-right sm:table-cell">Handed in</Th>
          <Th className="hidden text-right md:table-cell">Released</Th>
          <Th><span className="sr-only">Marking</span></Th>
        </Row>
      </thead>
      <tbody>{assignments.map((assignment) => <AssignmentLine key={assignment.id} assignment={assignment} />)}</tbody>
    </Table>
  );
}

function AssignmentLine({ assignment }: { readonly assignment: ListedAssignment }) {
  const { id, title, excerptTitle, composer, state, dueAt, handedIn, released, students } = assignment;
  return (
    <Row>
      <Th scope="row">
        <Link href={`/assignments/${id}`} className="link font-book text-lead">{title}</Link>
        <p className="text-small font-normal text-ink-soft">{[composer, excerptTitle].filter(Boolean).join(', ')}</p>
        <p className="text-small font-normal text-ink-soft sm:hidden">{handedIn} of {students} handed in{dueAt ? <>, due <LocalTime at={dueAt.toISOString()} /></> : null}</p>
      </Th>
      <Td><AssignmentStateMark state={state} /></Td>
      <Td className="hidden sm:table-cell">{dueAt ? <LocalTime at={dueAt.toISOString()} /> : <span className="text-ink-soft">no date</span>}</Td>
      <Td className="tabular hidden text-right whitespace-nowrap sm:table-cell">{handedIn} of {students}</Td>
      <Td className="tabular hidden text-right md:table-cell">{released}</Td>
      <Td className="text-right">{handedIn > 0 ? <ButtonLink size="small" href={`/assignments/${id}/marking`}>Mark</ButtonLink> : null}</Td>
    </Row>
  );
}
