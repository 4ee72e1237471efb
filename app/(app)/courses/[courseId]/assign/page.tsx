import type { Metadata } from 'next';
import { ButtonLink, EmptyState, PageHeader } from '@/components/ui';
import { listKeySources } from '@/db/queries/assignments';
import { findCourse } from '@/db/queries/courses';
import { canPrepareAssignments, isStaff } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { AssignForm } from './_components/assign-form';

export const metadata: Metadata = { title: 'New assignment' };

interface AssignPageProps {
  readonly params: Promise<{ readonly courseId: string }>;
  readonly searchParams: Promise<{ readonly excerpt?: string }>;
}

export default async function AssignPage({ params, searchParams }: AssignPageProps) {
  const actor = await requireActor(isStaff);
  const { courseId } = await params;
  const { db } = createDeps();
  const found = await findCourse(db, actor, courseId);
  const course = orNotFound(found && canPrepareAssignments(actor, found.courseRole) ? found : null);
  const sources = await listKeySources(db, actor);
  const readings = sources.map(({ updatedAt, ...source }) => ({ ...source, changed: updatedAt.toISOString() }));
  return (
    <div className="sheet pb-16">
      <PageHeader
        title="New assignment"
        subtitle={course.title}
        crumbs={[{ label: 'Courses', href: '/courses' }, { label: course.title, href: `/courses/${course.id}` }, { label: 'New assignment' }]}
      />
      {readings.length > 0 ? (
        <AssignForm courseId={course.id} readings={readings} {...excerptOf(await searchParams)} />
      ) : (
        <EmptyState title="Nothing to set yet" action={<ButtonLink href="/library" kind="primary">To the library</ButtonLink>}>
          An assignment needs an excerpt and a reading of it. Upload a score in the library and cut an excerpt; the program proposes a reading, and you make it yours.
        </EmptyState>
      )}
    </div>
  );
}

function excerptOf({ excerpt }: { readonly excerpt?: string }): { excerptId?: string } {
  return excerpt ? { excerptId: excerpt } : {};
}
