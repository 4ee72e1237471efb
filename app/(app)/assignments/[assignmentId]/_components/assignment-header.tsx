'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { AssignmentStateMark } from '@/components/marking/work-state';
import { Button, ButtonLink, Confirm, Menu, MenuAction, MenuLink, MenuRule, PageHeader } from '@/components/ui';
import { close, open, remove } from '../../actions';
import type { EditedAssignment } from './edited-assignment';

interface AssignmentHeaderProps {
  readonly assignment: EditedAssignment;
  readonly keyReadingId: string;
  readonly runs: boolean;
  readonly begun: boolean;
  readonly handedIn: number;
}

export function AssignmentHeader({ assignment, keyReadingId, runs, begun, handedIn }: AssignmentHeaderProps) {
  const { id, title, courseId, courseTitle, composer, scoreTitle, excerptTitle } = assignment;
  return (
    <PageHeader
      title={title}
      subtitle={[composer, scoreTitle, excerptTitle].filter((part, i, all) => part && all.indexOf(part) === i).join(', ')}
      crumbs={[{ label: 'Courses', href: '/courses' }, { label: courseTitle, href: `/courses/${courseId}` }, { label: title }]}
      actions={
        <>
          <AssignmentStateMark state={assignment.state} />
          <ButtonLink href={`/assignments/${id}/preview`}>As a student sees it</ButtonLink>
          {handedIn > 0 ? <ButtonLink kind="primary" href={`/assignments/${id}/marking`}>Mark</ButtonLink> : null}
          {runs ? <StateButton assignment={assignment} /> : null}
          <MoreMenu assignment={assignment} keyReadingId={keyReadingId} mayDelete={!begun && (runs || assignment.state === 'draft')} />
        </>
      }
    />
  );
}

const STEPS = {
  draft: { act: open, label: 'Open it', done: 'Students see it now.', primary: true },
  open: { act: close, label: 'Close it', done: 'It takes no more work.', primary: false },
  closed: { act: open, label: 'Open it again', done: 'It takes work again.', primary: false },
} as const;

function StateButton({ assignment }: { readonly assignment: EditedAssignment }) {
  const [busy, act] = useAct();
  const [asked, setAsked] = useState(false);
  const step = STEPS[assignment.state];
  const run = () => act(() => step.act({ assignmentId: assignment.id }), step.done);
  return (
    <>
      <Button kind={step.primary ? 'primary' : 'plain'} busy={busy} onClick={() => (assignment.state === 'open' ? setAsked(true) : void run())}>{step.label}</Button>
      <Confirm
        open={asked}
        onOpenChange={setAsked}
        title="Close this assignment?"
        description="Students can no longer write or hand in. What they have begun is kept: you can collect it under “Work”, or open the assignment again."
        confirm="Close it"
        kind="primary"
        onConfirm={async () => {
          await run();
          setAsked(false);
        }}
      />
    </>
  );
}

function MoreMenu({ assignment, keyReadingId, mayDelete }: { readonly assignment: EditedAssignment; readonly keyReadingId: string; readonly mayDelete: boolean }) {
  const router = useRouter();
  const [asked, setAsked] = useState(false);
  const [, act] = useAct();
  return (
    <>
      <Menu trigger={<Button kind="quiet">More</Button>}>
        <MenuLink href={`/desk/${keyReadingId}`}>Edit the key at the desk</MenuLink>
        <MenuLink href={`/excerpts/${assignment.excerptId}`}>The excerpt in the library</MenuLink>
        {mayDelete ? (
          <>
            <MenuRule />
            <MenuAction danger onSelect={() => setAsked(true)}>Delete …</MenuAction>
          </>
        ) : null}
      </Menu>
      <Confirm
        open={asked}
        onOpenChange={setAsked}
        title="Delete this assignment?"
        description="Nobody has begun it. The key stays in the library."
        confirm="Delete the assignment"
        onConfirm={async () => {
          const done = await act(() => remove({ assignmentId: assignment.id }), 'The assignment is deleted.');
          setAsked(false);
          if (done) router.push(`/courses/${assignment.courseId}`);
        }}
      />
    </>
  );
}
