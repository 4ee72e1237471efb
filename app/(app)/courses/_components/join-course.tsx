'use client';

import { useState } from 'react';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, Dialog, DialogActions, ErrorNote, Field, Input, useAnnouncer } from '@/components/ui';
import { join } from '../actions';

export function JoinCourse() {
  const [open, setOpen] = useState(false);
  const { announce } = useAnnouncer();
  const { busy, fields, failure, onSubmit } = useSubmit(join, ({ title }) => {
    setOpen(false);
    announce(`You are in ${title} now.`);
  });
  return (
    <>
      <Button onClick={() => setOpen(true)}>Join a course</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Join a course" description="Your instructor gave out a code of letters and figures.">
        <form onSubmit={onSubmit} className="flex flex-col gap-4">
          {failure ? <ErrorNote>{failure}</ErrorNote> : null}
          <Field label="Code" error={fields['code']} required>
            <Input name="code" autoComplete="off" autoCapitalize="characters" spellCheck={false} maxLength={20} className="tabular uppercase" />
          </Field>
          <DialogActions>
            <Button onClick={() => setOpen(false)}>Not now</Button>
            <Button type="submit" kind="primary" busy={busy} busyText="Joining …">Join</Button>
          </DialogActions>
        </form>
      </Dialog>
    </>
  );
}
