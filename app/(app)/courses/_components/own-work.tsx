import Link from 'next/link';
import { EmptyState, Section } from '@/components/ui';
import type { ListedCourse } from '@/db/queries/courses';
import type { OwnWork as Work } from '@/db/queries/submissions';
import { WorkTable } from './work-table';

interface OwnWorkProps {
  readonly work: readonly Work[];
  readonly courses: readonly ListedCourse[];
  readonly now: Date;
}

/** A student's start: what to do now, what is with the markers, what came back; then the courses. */
export function OwnWork({ work, courses, now }: OwnWorkProps) {
  if (courses.length === 0) {
    return (
      <EmptyState title="You are in no course yet">
        Your instructor adds you, or gives you a code: then use “Join a course”.
      </EmptyState>
    );
  }
  const isOver = (one: Work) => one.state === 'closed' || (one.closesAt !== null && one.closesAt <= now);
  const toDo = work.filter((one) => !isOver(one) && (one.submission === null || one.submission.state === 'working'));
  const rest = work.filter((one) => !toDo.includes(one));
  return (
    <>
      <Section title="To do">
        {toDo.length > 0 ? <WorkTable caption="To do" work={toDo} now={now} /> : <EmptyState title="Nothing to do now">What your instructors set next is listed here.</EmptyState>}
      </Section>
      {rest.length > 0 ? <Section title="Handed in and closed"><WorkTable caption="Handed in and closed" work={rest} now={now} /></Section> : null}
      <Section title="Courses">
        <ul className="flex flex-col gap-1">
          {courses.map((course) => (
            <li key={course.id}>
              <Link href={`/courses/${course.id}`} className="link font-book text-lead">{course.title}</Link>
              <span className="ml-3 text-small text-ink-soft">{[course.code, course.term].filter(Boolean).join(', ')}</span>
            </li>
          ))}
        </ul>
      </Section>
    </>
  );
}
