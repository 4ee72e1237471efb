import { EmptyState, Section } from '@/components/ui';
import type { OwnWork } from '@/db/queries/submissions';
import { DEFAULT_CONVENTIONS, type ConventionSheet } from '@/lib/theory/conventions';
import { WorkTable } from '../../_components/work-table';
import { ConventionSamples } from './convention-samples';

interface StudentCourseProps {
  readonly work: readonly OwnWork[];
  readonly conventions: ConventionSheet | null;
  readonly now: Date;
}

export function StudentCourse({ work, conventions, now }: StudentCourseProps) {
  return (
    <>
      <Section title="Assignments">
        {work.length > 0 ? <WorkTable caption="Assignments" work={work} now={now} inCourse /> : <EmptyState title="Nothing set yet">What your instructor sets is listed here.</EmptyState>}
      </Section>
      <Section title="How labels are spelled here">
        <ConventionSamples sheet={conventions ?? DEFAULT_CONVENTIONS} />
      </Section>
    </>
  );
}
