'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button, Dialog, Menu, MenuAction, MenuHeading, MenuLink, MenuRule, useAnnouncer } from '@/components/ui';
import { deleteExcerptAction, restoreExcerptAction } from '../actions';
import { EditExcerpt } from './edit-excerpt';

interface ExcerptActionsProps {
  readonly excerpt: { readonly id: string; readonly scoreId: string; readonly title: string; readonly purpose: string };
  readonly courses: readonly { readonly id: string; readonly title: string }[];
  readonly changeable: boolean;
}

/** Assign, edit, delete: what concerns the excerpt and no single reading. */
export function ExcerptActions({ excerpt, courses, changeable }: ExcerptActionsProps) {
  const [editing, setEditing] = useState(false);
  const remove = useDeleteExcerpt(excerpt);
  return (
    <>
      {courses.length > 0 ? (
        <Menu trigger={<Button>Assign</Button>}>
          <MenuHeading>Set it in a course</MenuHeading>
          {courses.map(({ id, title }) => <MenuLink key={id} href={`/courses/${id}/assign?excerpt=${excerpt.id}`}>{title}</MenuLink>)}
        </Menu>
      ) : null}
      {changeable ? (
        <Menu trigger={<Button kind="quiet" aria-label="More about this excerpt">More</Button>}>
          <MenuAction onSelect={() => setEditing(true)}>Edit title and purpose</MenuAction>
          <MenuRule />
          <MenuAction danger onSelect={() => void remove()}>Delete the excerpt</MenuAction>
        </Menu>
      ) : null}
      <Dialog open={editing} onOpenChange={setEditing} title="About this excerpt">
        <EditExcerpt excerpt={excerpt} onDone={() => setEditing(false)} />
      </Dialog>
    </>
  );
}

/** Deletes at once and offers to take it back; says why when an assignment still needs it. */
function useDeleteExcerpt({ id, scoreId, title }: ExcerptActionsProps['excerpt']): () => Promise<void> {
  const router = useRouter();
  const { announce, warn } = useAnnouncer();
  const restore = async () => {
    const answer = await restoreExcerptAction({ excerptId: id }).catch(() => null);
    if (answer?.ok) router.push(`/excerpts/${id}`);
    else warn(answer ? answer.error.message : 'The server cannot be reached. The excerpt is still deleted.');
  };
  return async () => {
    const answer = await deleteExcerptAction({ excerptId: id }).catch(() => null);
    if (!answer?.ok) return warn(answer ? answer.error.message : 'The server cannot be reached. Nothing was deleted.');
    announce(`“${title}” was deleted.`, { label: 'Undo', run: () => void restore() });
    router.push(`/scores/${scoreId}`);
  };
}
