import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { findAnswerFrame, findReading } from '@/db/queries/readings';
import { findAssignment } from '@/db/queries/assignments';
import { findOwnSubmission, findSubmissionToMark } from '@/db/queries/submissions';
import { canBeHere } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { loadReading } from '@/lib/workflows/read-reading';
import { StudentDesk } from './_components/student-desk';

interface SubmissionPageProps {
  readonly params: Promise<{ readonly submissionId: string }>;
}

export const metadata: Metadata = { title: 'Desk' };

export default async function SubmissionPage({ params }: SubmissionPageProps) {
  const actor = await requireActor(canBeHere);
  const { submissionId } = await params;
  const deps = createDeps();
  const toMark = await findSubmissionToMark(deps.db, actor, submissionId);
  if (toMark) redirect(`/assignments/${toMark.assignmentId}/marking?student=${submissionId}`);
  const submission = orNotFound(await findOwnSubmission(deps.db, actor, submissionId));
  const assignment = orNotFound(await findAssignment(deps.db, actor, submission.assignmentId));
  const head = orNotFound(await findReading(deps.db, actor, submission.readingId, deps.now()));
  const [reading, frame] = await Promise.all([loadReading(deps, actor, head), findAnswerFrame(deps.db, head.id)]);
  const { dueAt, closesAt } = assignment;
  return (
    <StudentDesk
      heading={<Link href={`/assignments/${assignment.id}`} className="truncate font-book text-lead no-underline hover:underline">{assignment.title}</Link>}
      submission={{ id: submission.id, state: submission.state, attempt: submission.attempt }}
      assignment={{
        id: assignment.id,
        instructions: assignment.instructions,
        attempts: assignment.attempts,
        dueAt: dueAt?.toISOString() ?? null,
        closesAt: closesAt?.toISOString() ?? null,
        late: dueAt !== null && dueAt <= deps.now(),
      }}
      working={head.access.working === true}
      bars={assignment.bars}
      userId={actor.userId}
      readingId={head.id}
      version={head.version}
      reading={reading}
      firstBar={head.firstBar}
      lastBar={head.lastBar}
      conventions={assignment.conventions}
      rules={{
        spansGiven: assignment.segmentation === 'given',
        keysGiven: assignment.keysGiven,
        // Where the spans are not given their starts are part of the key.
        askedStarts: assignment.segmentation === 'given' ? (frame?.askedStarts ?? []) : [],
      }}
    />
  );
}
