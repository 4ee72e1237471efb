import type { Metadata } from 'next';
import { ButtonLink, Mark } from '@/components/ui';
import { findAssignment, findExcerptBars, unsafeGetKeySignature } from '@/db/queries/assignments';
import { canPrepareAssignments, isStaff } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { blankAnswer } from '@/lib/workflows/blank-answer';
import { createDeps } from '@/lib/workflows/deps';
import { unsafeGetKey } from '@/lib/workflows/key-of-assignment';
import { readingOf } from '@/lib/workflows/stored-reading';
import { PreviewDesk } from './_components/preview-desk';

export const metadata: Metadata = { title: 'Preview' };

interface PreviewPageProps {
  readonly params: Promise<{ readonly assignmentId: string }>;
}

/** The desk as a student finds it, to try out; nothing is kept. */
export default async function PreviewPage({ params }: PreviewPageProps) {
  const actor = await requireActor(isStaff);
  const { assignmentId } = await params;
  const deps = createDeps();
  const found = await findAssignment(deps.db, actor, assignmentId);
  const assignment = orNotFound(found && canPrepareAssignments(actor, found.courseRole) ? found : null);
  const [{ key, readingId }, signature, range] = await Promise.all([
    unsafeGetKey(deps, assignmentId),
    unsafeGetKeySignature(deps.db, assignment.scoreId),
    findExcerptBars(deps.db, assignment.excerptId),
  ]);
  const isGiven = assignment.segmentation === 'given';
  return (
    <div className="flex h-[calc(100dvh-var(--spacing-header))] flex-col">
      <div className="flex flex-wrap items-baseline gap-x-4 border-b border-rule bg-bench px-3 py-1.5">
        <Mark tone="open" shape="ring" className="whitespace-normal">This is what a student finds. Try it: nothing is kept.</Mark>
        <ButtonLink size="small" kind="quiet" href={`/assignments/${assignmentId}`}>Back to the assignment</ButtonLink>
      </div>
      <div className="min-h-0 flex-1">
        <PreviewDesk
          title={assignment.title}
          keyReadingId={readingId}
          userId={actor.userId}
          reading={readingOf(blankAnswer(assignment, key, signature, deps.newId))}
          conventions={assignment.conventions}
          firstBar={range.firstBar}
          lastBar={range.lastBar}
          rules={{
            spansGiven: isGiven,
            keysGiven: assignment.keysGiven,
            askedStarts: isGiven ? key.labels.filter((label) => label.asked).map((label) => label.start) : [],
          }}
        />
      </div>
    </div>
  );
}
