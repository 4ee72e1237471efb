'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, Confirm, Dialog, DialogActions, ErrorNote, Menu, MenuAction, MenuRule, useAnnouncer } from '@/components/ui';
import { CourseFields } from '../../_components/course-fields';
import { archive, change } from '../../actions';

interface CourseMenuProps {
  readonly course: { readonly id: string; readonly title: string; readonly term: string; readonly code: string; readonly archived: boolean };
}

export function CourseMenu({ course }: CourseMenuProps) {
  const [asked, setAsked] = useState<'change' | 'archive' | null>(null);
  const [, act] = useAct();
  const restore = () => void act(() => archive({ courseId: course.id, archived: false }), 'The course runs again.');
  const close = () => setAsked(null);
  return (
    <>
      <Menu trigger={<Button>More</Button>}>
        <MenuAction onSelect={() => setAsked('change')}>Title, term and code …</MenuAction>
        <MenuRule />
        {course.archived ? <MenuAction onSelect={restore}>Let it run again</MenuAction> : <MenuAction onSelect={() => setAsked('archive')}>End the course …</MenuAction>}
      </Menu>
      <ChangeCourse course={course} open={asked === 'change'} close={close} />
      <Confirm
        open={asked === 'archive'}
        onOpenChange={close}
        title="End this course?"
        description="It moves to the end of the list, its code stops working, and its work stays readable. You can let it run again."
        confirm="End the course"
        kind="primary"
        onConfirm={async () => {
          await act(() => archive({ courseId: course.id, archived: true }), 'The course is over.');
          close();
        }}
      />
    </>
  );
}

function ChangeCourse({ course, open, close }: CourseMenuProps & { readonly open: boolean; readonly close: () => void }) {
  const { announce } = useAnnouncer();
  const { busy, fields, failure, onSubmit } = useSubmit(change, () => {
    close();
    announce('Changed.');
  });
  return (
    <Dialog open={open} onOpenChange={close} title="Title, term and code">
      <form onSubmit={onSubmit} className="flex flex-col gap-4">
        {failure ? <ErrorNote>{failure}</ErrorNote> : null}
        <input type="hidden" name="courseId" value={course.id} />
        <CourseFields fields={fields} course={course} />
        <DialogActions>
          <Button onClick={close}>Leave it</Button>
          <Button type="submit" kind="primary" busy={busy}>Change</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
