import type { Metadata } from 'next';
import { Suspense } from 'react';
import { PageHeader } from '@/components/ui';
import { listCourses } from '@/db/queries/courses';
import { listOwnWork } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canBeHere, canCreateCourse, isStaff } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { CourseTable } from './_components/course-table';
import { JoinCourse } from './_components/join-course';
import { NewCourse } from './_components/new-course';
import { OwnWork } from './_components/own-work';
import { PageSkeleton } from './_components/page-skeleton';

export const metadata: Metadata = { title: 'Courses' };

export default async function CoursesPage() {
  const actor = await requireActor(canBeHere);
  return <Suspense fallback={<PageSkeleton />}><Courses actor={actor} /></Suspense>;
}

async function Courses({ actor }: { readonly actor: Actor }) {
  const { db, now } = createDeps();
  const [courses, work] = await Promise.all([listCourses(db, actor), listOwnWork(db, actor)]);
  if (!isStaff(actor)) {
    return (
      <div className="sheet pb-16">
        <PageHeader title="My work" subtitle="What is set, what is due, and what came back" actions={<JoinCourse />} />
        <OwnWork work={work} courses={courses} now={now()} />
      </div>
    );
  }
  return (
    <div className="sheet pb-16">
      <PageHeader title="Courses" actions={canCreateCourse(actor) ? <NewCourse /> : null} />
      <CourseTable courses={courses} mayCreate={canCreateCourse(actor)} />
    </div>
  );
}
