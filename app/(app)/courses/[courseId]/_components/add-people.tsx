'use client';

import { useMemo, useState } from 'react';
import { Button, Dialog, DialogActions, ErrorNote, Field, Select, TextArea } from '@/components/ui';
import { COURSE_ROLES, type CourseRole } from '@/lib/vocabularies';
import type { AddedPerson } from '@/lib/workflows/add-people';
import { addToRoster } from '../../actions';
import { AddedList, RosterPreview } from './roster-preview';
import { parseRoster } from './parse-roster';

interface AddPeopleProps {
  readonly courseId: string;
  /** E-mails of those who are in the course. */
  readonly known: readonly string[];
}

/** A list pasted or taken from a file, looked at line by line, then added: members at once, others by invitation. */
export function AddPeople({ courseId, known }: AddPeopleProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>Add people</Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        wide
        title="Add people"
        description="One person a line: name and e-mail, as a spreadsheet or the registrar gives them. Nobody is added or written to before you have seen the list."
      >
        {open ? <AddForm courseId={courseId} known={known} close={() => setOpen(false)} /> : null}
      </Dialog>
    </>
  );
}

function AddForm({ courseId, known, close }: AddPeopleProps & { readonly close: () => void }) {
  const [text, setText] = useState('');
  const [role, setRole] = useState<CourseRole>('student');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const [added, setAdded] = useState<readonly AddedPerson[] | null>(null);
  const lines = useMemo(() => parseRoster(text).map((line) => (known.includes(line.email) ? { ...line, problem: 'In the course already.' } : line)), [text, known]);
  const ready = lines.filter((line) => line.problem === null);

  const send = async () => {
    setBusy(true);
    setFailure(null);
    const people = ready.map(({ name, email }) => ({ name, email }));
    const outcome = await addToRoster({ courseId, role, people }).catch(() => null);
    setBusy(false);
    if (outcome?.ok) setAdded(outcome.value.people);
    else setFailure(outcome?.error.message ?? 'The server did not answer. Nothing was lost; try again.');
  };

  if (added) {
    return (
      <>
        <AddedList people={added} />
        <DialogActions><Button kind="primary" onClick={close}>Done</Button></DialogActions>
      </>
    );
  }
  return (
    <div className="flex flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      <Field label="List" hint="Separated by commas, semicolons or tabs; a header row is recognised.">
        <TextArea rows={6} value={text} onChange={(event) => setText(event.target.value)} placeholder={'Name, e-mail'} spellCheck={false} />
      </Field>
      <div className="flex flex-wrap items-end gap-4">
        <FileChoice onText={setText} onFailed={setFailure} />
        <Field label="They are" className="w-44">
          <Select value={role} onChange={(event) => setRole(COURSE_ROLES.find((one) => one === event.target.value) ?? role)}>
            {COURSE_ROLES.toReversed().map((one) => <option key={one} value={one}>{one}s</option>)}
          </Select>
        </Field>
      </div>
      <RosterPreview lines={lines} />
      <DialogActions>
        <Button onClick={close}>Not now</Button>
        <Button kind="primary" busy={busy} busyText="Adding …" disabled={ready.length === 0} onClick={() => void send()}>
          {ready.length === 1 ? 'Add 1 person' : `Add ${ready.length} people`}
        </Button>
      </DialogActions>
    </div>
  );
}

const LARGEST = 512 * 1024;

function FileChoice({ onText, onFailed }: { readonly onText: (text: string) => void; readonly onFailed: (message: string | null) => void }) {
  const read = async (file: File | undefined) => {
    if (!file) return;
    if (file.size > LARGEST) return onFailed(`${file.name} is too large for a list of people: at most 512 kB.`);
    onFailed(null);
    onText(await file.text());
  };
  return (
    <Field label="Or a CSV file">
      <input
        type="file"
        accept=".csv,.tsv,.txt,text/csv,text/plain"
        aria-label="Or a CSV file"
        onChange={(event) => void read(event.target.files?.[0])}
        className="max-w-full text-small file:mr-3 file:min-h-9 file:border file:border-rule-strong file:bg-sheet file:px-3 file:text-ink"
      />
    </Field>
  );
}
