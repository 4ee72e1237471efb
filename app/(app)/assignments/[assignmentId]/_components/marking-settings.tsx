'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { RubricForm } from '@/components/marking/rubric-form';
import { RubricSamples } from '@/components/marking/rubric-samples';
import { Button, ErrorNote, WarningNote } from '@/components/ui';
import { checkRubric } from '@/lib/marking/rubric';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { change } from '../../actions';
import { type EditedAssignment, changeInputOf } from './edited-assignment';

/** The rubric, and beside it what it gives for typical answers. */
export function MarkingSettings({ assignment, mayChange }: { readonly assignment: EditedAssignment; readonly mayChange: boolean }) {
  const [rubric, setRubric] = useState(assignment.rubric);
  const [busy, act] = useAct();
  const isChanged = JSON.stringify(rubric) !== JSON.stringify(assignment.rubric);
  const faults = checkRubric(rubric);
  const save = () => act(() => change({ ...changeInputOf(assignment), rubric }), 'The rubric is saved.');
  return (
    <div className="grid gap-x-12 gap-y-8 lg:grid-cols-2">
      <div className="flex flex-col gap-6">
        <RubricForm rubric={rubric} open={assignment.segmentation === 'open'} keysGiven={assignment.keysGiven} disabled={!mayChange} onChange={setRubric} />
        {faults.length > 0 ? <ErrorNote>{faults.join(' ')}</ErrorNote> : null}
        {mayChange ? (
          <div className="flex flex-wrap items-center gap-3">
            <Button kind="primary" busy={busy} disabled={!isChanged || faults.length > 0} onClick={() => void save()}>Save the rubric</Button>
            {isChanged ? <Button kind="quiet" onClick={() => setRubric(assignment.rubric)}>Back to what is saved</Button> : null}
          </div>
        ) : null}
      </div>
      <div className="flex flex-col gap-4 self-start lg:sticky lg:top-4">
        <RubricSamples rubric={rubric} sheet={assignment.conventions ?? DEFAULT_CONVENTIONS} keysGiven={assignment.keysGiven} />
        {assignment.state === 'draft' ? null : <WarningNote>Work that is handed in keeps its marks until you mark it again; “Mark” shows what would change first.</WarningNote>}
      </div>
    </div>
  );
}
