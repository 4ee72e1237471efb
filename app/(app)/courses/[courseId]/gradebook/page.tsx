import type { Metadata } from 'next';
import { ButtonLink, PageHeader, buttonClass } from '@/components/ui';
import { isStaff } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { getGradebook, unsafeListAnswers } from '@/lib/workflows/gradebook';
import { CourseTabs } from '../_components/course-tabs';
import { GradebookTable } from './_components/gradebook-table';
import { Reteach } from './_components/reteach';

export const metadata: Metadata = { title: 'Gradebook' };

interface GradebookPageProps {
  readonly params: Promise<{ readonly courseId: string }>;
}

export default async function GradebookPage({ params }: GradebookPageProps) {
  const actor = await requireActor(isStaff);
  const deps = createDeps();
  const found = await getGradebook(deps, actor, (await params).courseId);
  const gradebook = orNotFound(found.ok ? found.value : null);
  const { course } = gradebook;
  return (
    <div className="sheet pb-16">
      <PageHeader
        title="Gradebook"
        subtitle={course.title}
        crumbs={[{ label: 'Courses', href: '/courses' }, { label: course.title, href: `/courses/${course.id}` }, { label: 'Gradebook' }]}
        actions={
          <>
            <a href={`/courses/${course.id}/gradebook/export`} download className={buttonClass()}>Download as CSV</a>
            <ButtonLink kind="quiet" href={`/courses/${course.id}`}>Back to the course</ButtonLink>
          </>
        }
      />
      <CourseTabs
        tabs={[
          { value: 'marks', label: 'Marks', content: <GradebookTable gradebook={gradebook} /> },
          { value: 'reteach', label: 'What to reteach', content: <Reteach answers={await unsafeListAnswers(deps, gradebook)} /> },
        ]}
      />
    </div>
  );
}
