'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, Dialog, DialogActions, ErrorNote } from '@/components/ui';
import { create } from '../actions';
import { CourseFields } from './course-fields';

export function NewCourse() {
  const router = useRouter();
  const [leaving, leave] = useTransition();
  const [open, setOpen] = useState(false);
  const { busy, fields, failure, onSubmit } = useSubmit(create, ({ courseId }) => leave(() => router.push(`/courses/${courseId}`)));
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>New course</Button>
      <Dialog open={open} onOpenChange={setOpen} title="New course" description="You teach it. People, assignments and spelling of labels come next.">
        <form onSubmit={onSubmit} className="flex flex-col gap-4">
          {failure ? <ErrorNote>{failure}</ErrorNote> : null}
          <CourseFields fields={fields} />
          <DialogActions>
            <Button onClick={() => setOpen(false)}>Not now</Button>
            <Button type="submit" kind="primary" busy={busy || leaving} busyText="Opening …">Open the course</Button>
          </DialogActions>
        </form>
      </Dialog>
    </>
  );
}
