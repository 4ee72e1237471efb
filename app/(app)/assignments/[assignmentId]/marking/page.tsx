import type { Metadata } from 'next';
import { Suspense } from 'react';
import { ButtonLink, EmptyState, PageHeader, SkeletonRows } from '@/components/ui';
import { type Assignment, findAssignment, findExcerptBars } from '@/db/queries/assignments';
import { listUsedRemarks, unsafeListMarks } from '@/db/queries/marks';
import { countingAttempts, listSubmissions } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canMark, canPrepareAssignments, canRelease, isStaff } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { unsafeGetKey } from '@/lib/workflows/key-of-assignment';
import { findMarkChanges } from '@/lib/workflows/mark-again';
import { MarkingBoard } from './_components/marking-board';
import { questionsOf, studentsOf } from './_components/marking-views';

interface MarkingPageProps {
  readonly params: Promise<{ readonly assignmentId: string }>;
  readonly searchParams: Promise<{ readonly student?: string }>;
}

export const metadata: Metadata = { title: 'Marking' };

export default async function MarkingPage({ params, searchParams }: MarkingPageProps) {
  const actor = await requireActor(isStaff);
  const found = await findAssignment(createDeps().db, actor, (await params).assignmentId);
  const assignment = orNotFound(found && canMark(actor, found.courseRole) ? found : null);
  return (
    <div className="sheet pb-16">
      <PageHeader
        title="Marking"
        subtitle={assignment.title}
        crumbs={[
          { label: 'Courses', href: '/courses' },
          { label: assignment.courseTitle, href: `/courses/${assignment.courseId}` },
          { label: assignment.title, href: `/assignments/${assignment.id}` },
          { label: 'Marking' },
        ]}
      />
      <Suspense fallback={<SkeletonRows rows={6} label="Fetching the answers" />}>
        <Board actor={actor} assignment={assignment} student={(await searchParams).student ?? null} />
      </Suspense>
    </div>
  );
}

async function Board({ actor, assignment, student }: { readonly actor: Actor; readonly assignment: Assignment; readonly student: string | null }) {
  const deps = createDeps();
  const submissions = countingAttempts(await listSubmissions(deps.db, actor, assignment.id));
  if (submissions.length === 0) {
    return (
      <EmptyState title="Nothing to mark yet" action={<ButtonLink href={`/assignments/${assignment.id}`}>Back to the assignment</ButtonLink>}>
        As soon as a student hands in, the answers are compared with the key and stand here by question.
      </EmptyState>
    );
  }
  const [marks, { key, readingId }, remarks, changes, range] = await Promise.all([
    unsafeListMarks(deps.db, submissions.map((submission) => submission.id)),
    unsafeGetKey(deps, assignment.id),
    listUsedRemarks(deps.db, actor, assignment.courseId),
    findMarkChanges(deps, actor, assignment.id),
    findExcerptBars(deps.db, assignment.excerptId),
  ]);
  return (
    <MarkingBoard
      assignment={{
        id: assignment.id,
        bars: assignment.bars,
        conventions: assignment.conventions,
        keysGiven: assignment.keysGiven,
        pointStep: assignment.rubric.pointStep,
        ...range,
      }}
      keyReadingId={readingId}
      questions={questionsOf(key, submissions, marks)}
      students={studentsOf(submissions, marks, assignment.dueAt)}
      remarks={remarks}
      changes={changes.ok ? changes.value : []}
      mayRelease={canRelease(actor, assignment.courseRole)}
      mayChangeKey={canPrepareAssignments(actor, assignment.courseRole)}
      opened={submissions.find((submission) => submission.id === student)?.id ?? null}
    />
  );
}
