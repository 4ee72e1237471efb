import Link from 'next/link';
import { LocalTime } from '@/components/marking/local-time';
import { WorkStateMark } from '@/components/marking/work-state';
import { Mark, Row, Table, Td, Th } from '@/components/ui';
import type { OwnWork } from '@/db/queries/submissions';
import { formatPoints } from '@/lib/marking/points';

interface WorkTableProps {
  readonly caption: string;
  readonly work: readonly OwnWork[];
  readonly now: Date;
  /** The course is plain from the page. */
  readonly inCourse?: boolean;
}

export function WorkTable({ caption, work, now, inCourse = false }: WorkTableProps) {
  return (
    <Table caption={caption}>
      <thead>
        <Row>
          <Th>Assignment</Th>
          {inCourse ? null : <Th className="hidden md:table-cell">Course</Th>}
          <Th className="hidden sm:table-cell">Due</Th>
          <Th>State</Th>
          <Th className="text-right">Points</Th>
        </Row>
      </thead>
      <tbody>
        {work.map((one) => (
          <Row key={one.assignmentId}>
            <Th scope="row">
              <Link href={linkOf(one)} className="link font-book text-lead">{one.assignmentTitle}</Link>
              {inCourse ? null : <p className="text-small font-normal text-ink-soft md:hidden">{one.courseTitle}</p>}
              <div className="text-small font-normal sm:hidden"><Due work={one} now={now} /></div>
            </Th>
            {inCourse ? null : <Td className="hidden text-ink-soft md:table-cell">{one.courseTitle}</Td>}
            <Td className="hidden sm:table-cell"><Due work={one} now={now} /></Td>
            <Td><WorkStateMark state={one.submission?.state ?? null} /></Td>
            <Td className="tabular text-right whitespace-nowrap">{pointsOf(one)}</Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

/** Straight to where one goes on: the desk while at work, the feedback when it is back, else the assignment. */
function linkOf({ assignmentId, submission }: OwnWork): string {
  if (submission?.state === 'working') return `/submissions/${submission.id}`;
  if (submission?.state === 'released') return `/submissions/${submission.id}/feedback`;
  return `/assignments/${assignmentId}`;
}

function pointsOf({ submission }: OwnWork): string {
  if (submission?.points === null || submission?.points === undefined || submission.maxPoints === null) return '–';
  return `${formatPoints(submission.points)} of ${formatPoints(submission.maxPoints)}`;
}

function Due({ work, now }: { readonly work: OwnWork; readonly now: Date }) {
  const { dueAt, opensAt, state, submission } = work;
  if (opensAt && opensAt > now) return <span className="text-ink-soft">opens <LocalTime at={opensAt.toISOString()} /></span>;
  if (!dueAt) return <span className="text-ink-soft">no date</span>;
  const isOpenWork = state === 'open' && (submission === null || submission.state === 'working');
  return (
    <span className="flex flex-wrap items-baseline gap-x-2">
      <LocalTime at={dueAt.toISOString()} />
      {isOpenWork && dueAt <= now ? <Mark tone="eye" shape="triangle">late</Mark> : null}
    </span>
  );
}
