import type { Metadata } from 'next';
import { type Assignment, findAssignment, hasSubmissions } from '@/db/queries/assignments';
import { findExcerptBars } from '@/db/queries/assignments';
import { listRoster } from '@/db/queries/courses';
import { listOwnSubmissions, listSubmissions } from '@/db/queries/submissions';
import type { Actor } from '@/lib/auth/actor';
import { canBeHere, canHandIn, canPrepareAssignments, canRunCourse } from '@/lib/auth/permissions';
import { orNotFound, requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { unsafeGetKey } from '@/lib/workflows/key-of-assignment';
import { unsafeCheckAssignment } from '@/lib/workflows/open-assignment';
import { refusalAt } from '@/lib/workflows/start-submission';
import { AssignmentEditor } from './_components/assignment-editor';
import { editedAssignment } from './_components/edited-assignment';
import { StudentStart } from './_components/student-start';

interface AssignmentPageProps {
  readonly params: Promise<{ readonly assignmentId: string }>;
}

async function getAssignment({ params }: AssignmentPageProps): Promise<{ actor: Actor; assignment: Assignment }> {
  const actor = await requireActor(canBeHere);
  const { assignmentId } = await params;
  return { actor, assignment: orNotFound(await findAssignment(createDeps().db, actor, assignmentId)) };
}

export async function generateMetadata(props: AssignmentPageProps): Promise<Metadata> {
  return { title: (await getAssignment(props)).assignment.title };
}

export default async function AssignmentPage(props: AssignmentPageProps) {
  const { actor, assignment } = await getAssignment(props);
  if (canPrepareAssignments(actor, assignment.courseRole)) return <Prepared actor={actor} assignment={assignment} />;
  return orNotFound(canHandIn(actor, assignment.courseRole) ? <Taken actor={actor} assignment={assignment} /> : null);
}

interface ViewProps {
  readonly actor: Actor;
  readonly assignment: Assignment;
}

async function Prepared({ actor, assignment }: ViewProps) {
  const deps = createDeps();
  const [{ key, reading, readingId }, findings, submissions, roster, begun, range] = await Promise.all([
    unsafeGetKey(deps, assignment.id),
    unsafeCheckAssignment(deps, assignment),
    listSubmissions(deps.db, actor, assignment.id),
    listRoster(deps.db, actor, assignment.courseId),
    hasSubmissions(deps.db, assignment.id),
    findExcerptBars(deps.db, assignment.excerptId),
  ]);
  return (
    <AssignmentEditor
      assignment={editedAssignment(assignment, range)}
      keyLabels={key.labels}
      reading={reading}
      keyReadingId={readingId}
      findings={findings}
      begun={begun}
      runs={canRunCourse(actor, assignment.courseRole)}
      over={assignment.state === 'closed' || (assignment.closesAt !== null && assignment.closesAt <= deps.now())}
      students={roster.filter((row) => row.courseRole === 'student').map(({ userId, name }) => ({ userId, name }))}
      submissions={submissions.map(({ id, studentId, studentName, attempt, state, handedInAt, points, maxPoints }) => ({
        id, studentId, studentName, attempt, state, points, maxPoints, handedInAt: handedInAt?.toISOString() ?? null,
      }))}
    />
  );
}

async function Taken({ actor, assignment }: ViewProps) {
  const { db, now } = createDeps();
  const submissions = await listOwnSubmissions(db, actor, assignment.id);
  const refusal = refusalAt(assignment, now(), submissions.length);
  return <StudentStart assignment={assignment} submissions={submissions} refusal={refusal?.message ?? null} taken={refusal === null} now={now()} />;
}
