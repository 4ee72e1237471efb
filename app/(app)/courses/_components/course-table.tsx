import Link from 'next/link';
import { EmptyState, Row, StateMark, Table, Tag, Td, Th } from '@/components/ui';
import type { ListedCourse } from '@/db/queries/courses';

interface CourseTableProps {
  readonly courses: readonly ListedCourse[];
  readonly mayCreate: boolean;
}

export function CourseTable({ courses, mayCreate }: CourseTableProps) {
  if (courses.length === 0) {
    return (
      <EmptyState title="No course yet">
        {mayCreate
          ? 'A course holds a roster, assignments with their answer keys, and the marks. Open one with “New course”.'
          : 'An instructor puts you into a course; it is listed here then.'}
      </EmptyState>
    );
  }
  return (
    <Table caption="Courses">
      <thead>
        <Row>
          <Th>Course</Th>
          <Th className="hidden sm:table-cell">Term</Th>
          <Th className="hidden text-right sm:table-cell">Students</Th>
          <Th className="hidden text-right md:table-cell">Open assignments</Th>
          <Th className="text-right">To mark</Th>
        </Row>
      </thead>
      <tbody>{courses.map((course) => <CourseLine key={course.id} course={course} />)}</tbody>
    </Table>
  );
}

function CourseLine({ course }: { readonly course: ListedCourse }) {
  const { id, title, code, term, courseRole, archivedAt, students, openAssignments, toMark } = course;
  return (
    <Row>
      <Th scope="row">
        <span className="flex flex-wrap items-baseline gap-x-3">
          <Link href={`/courses/${id}`} className="link font-book text-lead">{title}</Link>
          {code ? <span className="text-small text-ink-soft">{code}</span> : null}
          {courseRole === 'assistant' ? <Tag>assistant</Tag> : null}
          {archivedAt ? <StateMark state="closed">over</StateMark> : null}
        </span>
        <p className="text-small font-normal text-ink-soft sm:hidden">{[term, students === 1 ? '1 student' : `${students} students`].filter(Boolean).join(', ')}</p>
      </Th>
      <Td className="hidden whitespace-nowrap sm:table-cell">{term}</Td>
      <Td className="tabular hidden text-right sm:table-cell">{students}</Td>
      <Td className="tabular hidden text-right md:table-cell">{openAssignments}</Td>
      <Td className="tabular text-right">{toMark > 0 ? <StateMark state="waiting">{toMark}</StateMark> : '–'}</Td>
    </Row>
  );
}
