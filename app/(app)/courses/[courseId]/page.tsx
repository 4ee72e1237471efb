import type { Metadata } from 'next';
import { Suspense } from 'react';
import { ButtonLink, PageHeader, StateMark } from '@/components/ui';
import { listAssignments } from '@/db/queries/assignments';
import { type Course, findCourse, findEnrolmentCode, listCourseInvitations, listRoster } from '@/db/queries/courses';
import { listOwnWork } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canBeHere, canMark, canPrepareAssignments, canRunCourse } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { PageSkeleton } from '../_components/page-skeleton';
import { AssignmentTable } from './_components/assignment-table';
import { CourseMenu } from './_components/course-menu';
import { CourseTabs } from './_components/course-tabs';
import { People } from './_components/people';
import { Spelling } from './_components/spelling';
import { StudentCourse } from './_components/student-course';

interface CoursePageProps {
  readonly params: Promise<{ readonly courseId: string }>;
}

async function getCourse({ params }: CoursePageProps): Promise<{ actor: Actor; course: Course }> {
  const actor = await requireActor(canBeHere);
  const { courseId } = await params;
  return { actor, course: orNotFound(await findCourse(createDeps().db, actor, courseId)) };
}

export async function generateMetadata(props: CoursePageProps): Promise<Metadata> {
  return { title: (await getCourse(props)).course.title };
}

export default async function CoursePage(props: CoursePageProps) {
  const { actor, course } = await getCourse(props);
  return (
    <Suspense fallback={<PageSkeleton />}>
      {canMark(actor, course.courseRole) ? <TaughtCourse actor={actor} course={course} /> : <TakenCourse actor={actor} course={course} />}
    </Suspense>
  );
}

interface CourseViewProps {
  readonly actor: Actor;
  readonly course: Course;
}

async function TakenCourse({ actor, course }: CourseViewProps) {
  const { db, now } = createDeps();
  const work = (await listOwnWork(db, actor)).filter((one) => one.courseId === course.id);
  return (
    <div className="sheet pb-16">
      <CourseHeader course={course} />
      <StudentCourse work={work} conventions={course.conventions} now={now()} />
    </div>
  );
}

async function TaughtCourse({ actor, course }: CourseViewProps) {
  const { db, now } = createDeps();
  const [assignments, roster, invitations, enrolmentCode] = await Promise.all([
    listAssignments(db, actor, course.id),
    listRoster(db, actor, course.id),
    listCourseInvitations(db, actor, course.id),
    findEnrolmentCode(db, actor, course.id),
  ]);
  const runs = canRunCourse(actor, course.courseRole);
  const prepares = canPrepareAssignments(actor, course.courseRole);
  const open = invitations.map(({ id, email, role, expiresAt }) => ({ id, email, role, expired: expiresAt <= now() }));
  return (
    <div className="sheet pb-16">
      <CourseHeader course={course} prepares={prepares} runs={runs} />
      <CourseTabs
        tabs={[
          { value: 'assignments', label: 'Assignments', content: <AssignmentTable assignments={assignments} courseId={course.id} prepares={prepares} /> },
          {
            value: 'people',
            label: `People (${roster.length})`,
            content: <People courseId={course.id} roster={roster} invitations={open} enrolmentCode={enrolmentCode} runs={runs} ownId={actor.userId} />,
          },
          { value: 'spelling', label: 'Spelling of labels', content: <Spelling courseId={course.id} conventions={course.conventions} runs={runs} /> },
        ]}
      />
    </div>
  );
}

function CourseHeader({ course, prepares = false, runs = false }: { readonly course: Course; readonly prepares?: boolean; readonly runs?: boolean }) {
  const { id, title, code, term, archivedAt } = course;
  return (
    <PageHeader
      title={title}
      subtitle={[code, term].filter(Boolean).join(', ')}
      crumbs={[{ label: 'Courses', href: '/courses' }, { label: title }]}
      actions={
        <>
          {archivedAt ? <StateMark state="closed">This course is over</StateMark> : null}
          {prepares ? <ButtonLink href={`/courses/${id}/gradebook`}>Gradebook</ButtonLink> : null}
          {prepares && !archivedAt ? <ButtonLink kind="primary" href={`/courses/${id}/assign`}>New assignment</ButtonLink> : null}
          {runs ? <CourseMenu course={{ id, title, code, term, archived: archivedAt !== null }} /> : null}
        </>
      }
    />
  );
}
