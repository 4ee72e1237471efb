import type { Metadata } from 'next';
import { PageHeader } from '@/components/ui';
import { findAssignment } from '@/db/queries/assignments';
import { unsafeListMarks } from '@/db/queries/marks';
import { findReading } from '@/db/queries/readings';
import { findOwnSubmission } from '@/db/queries/submissions';
import { canBeHere } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { formatPoints } from '@/lib/marking/points';
import { createDeps } from '@/lib/workflows/deps';
import { unsafeGetKey } from '@/lib/workflows/key-of-assignment';
import { loadReading } from '@/lib/workflows/read-reading';
import { FeedbackDesk } from './_components/feedback-desk';
import { feedbackOf } from './_components/feedback-of';

export const metadata: Metadata = { title: 'Feedback' };

interface FeedbackPageProps {
  readonly params: Promise<{ readonly submissionId: string }>;
}

/** Released marks, on the score and as a list. Before release there is nothing here. */
export default async function FeedbackPage({ params }: FeedbackPageProps) {
  const actor = await requireActor(canBeHere);
  const { submissionId } = await params;
  const deps = createDeps();
  const found = await findOwnSubmission(deps.db, actor, submissionId);
  const submission = orNotFound(found?.state === 'released' ? found : null);
  const assignment = orNotFound(await findAssignment(deps.db, actor, submission.assignmentId));
  const head = orNotFound(await findReading(deps.db, actor, submission.readingId, deps.now()));
  const [reading, marks, shown] = await Promise.all([
    loadReading(deps, actor, head),
    unsafeListMarks(deps.db, [submissionId]),
    assignment.showKeyAfterRelease ? unsafeGetKey(deps, assignment.id) : null,
  ]);
  const { points, maxPoints } = submission;
  return (
    <div className="sheet pb-16">
      <PageHeader
        title={assignment.title}
        subtitle={points !== null && maxPoints !== null ? <span className="tabular not-italic">{formatPoints(points)} of {formatPoints(maxPoints)} points</span> : undefined}
        crumbs={[
          { label: 'My work', href: '/courses' },
          { label: assignment.courseTitle, href: `/courses/${assignment.courseId}` },
          { label: assignment.title, href: `/assignments/${assignment.id}` },
          { label: 'Feedback' },
        ]}
      />
      <FeedbackDesk
        userId={actor.userId}
        readingId={head.id}
        version={head.version}
        reading={reading}
        firstBar={head.firstBar}
        lastBar={head.lastBar}
        bars={assignment.bars}
        conventions={assignment.conventions}
        keysGiven={assignment.keysGiven}
        feedback={marks.map((mark) => feedbackOf(mark, shown?.key ?? null))}
      />
    </div>
  );
}
