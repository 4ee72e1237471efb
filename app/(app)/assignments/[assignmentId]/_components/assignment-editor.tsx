'use client';

import { ErrorNote, Section, SettledNote, WarningNote } from '@/components/ui';
import { placeOf } from '@/components/marking/place-names';
import type { Reading } from '@/lib/harmony/reading';
import type { KeyFinding } from '@/lib/marking/check-key';
import type { KeyLabel } from '@/lib/marking/key-reading';
import { AssignmentTabs } from './assignment-tabs';
import { AssignmentHeader } from './assignment-header';
import type { EditedAssignment } from './edited-assignment';
import { FormSettings } from './form-settings';
import { MarkingSettings } from './marking-settings';
import { QuestionBoard } from './question-board';
import { type WorkRow, WorkList } from './work-list';

interface AssignmentEditorProps {
  readonly assignment: EditedAssignment;
  readonly keyLabels: readonly KeyLabel[];
  readonly reading: Reading;
  readonly keyReadingId: string;
  readonly findings: readonly KeyFinding[];
  /** Someone has begun: what is asked is fixed. */
  readonly begun: boolean;
  /** May open, close and change it once it is open. */
  readonly runs: boolean;
  readonly over: boolean;
  readonly students: readonly { readonly userId: string; readonly name: string }[];
  readonly submissions: readonly WorkRow[];
}

/** Everything about one assignment, for those who prepare it. */
export function AssignmentEditor(props: AssignmentEditorProps) {
  const { assignment, findings, begun, runs } = props;
  const mayChange = assignment.state === 'draft' || runs;
  const handedIn = props.submissions.filter((row) => row.state !== 'working').length;
  return (
    <div className="sheet pb-16">
      <AssignmentHeader assignment={assignment} keyReadingId={props.keyReadingId} runs={runs} begun={begun} handedIn={handedIn} />
      {assignment.state === 'draft' ? <Findings findings={findings} assignment={assignment} /> : null}
      {mayChange ? null : <WarningNote className="mb-6">This assignment is open: only those who run the course change it now.</WarningNote>}
      <AssignmentTabs
        tabs={[
          {
            value: 'asked',
            label: 'What is asked',
            content: (
              <QuestionBoard
                assignment={assignment}
                keyLabels={props.keyLabels}
                reading={props.reading}
                keyReadingId={props.keyReadingId}
                fixed={begun || !mayChange}
                mayChange={mayChange}
              />
            ),
          },
          { value: 'marking', label: 'How it is marked', content: <MarkingSettings assignment={assignment} mayChange={mayChange} /> },
          { value: 'form', label: 'Form and dates', content: <FormSettings assignment={assignment} fixed={begun} mayChange={mayChange} /> },
          {
            value: 'work',
            label: `Work (${handedIn})`,
            content: (
              <Section title="Work of the students">
                <WorkList assignment={assignment} students={props.students} submissions={props.submissions} runs={runs} over={props.over} />
              </Section>
            ),
          },
        ]}
      />
    </div>
  );
}

function Findings({ findings, assignment }: Pick<AssignmentEditorProps, 'findings' | 'assignment'>) {
  const stops = findings.filter((finding) => finding.severity === 'stop');
  const looks = findings.filter((finding) => finding.severity === 'look');
  const words = ({ message, starts }: KeyFinding) => (
    <p key={message}>
      {message}
      {starts.length > 0 ? <span className="text-ink-soft"> ({starts.slice(0, 4).map((start) => placeOf(assignment.bars, start)).join('; ')}{starts.length > 4 ? `; and ${starts.length - 4} more` : ''})</span> : null}
    </p>
  );
  return (
    <div className="mb-6 flex flex-col gap-2">
      {stops.length > 0 ? <ErrorNote title="This cannot open yet">{stops.map(words)}</ErrorNote> : null}
      {looks.length > 0 ? <WarningNote>{looks.map(words)}</WarningNote> : null}
      {findings.length === 0 ? <SettledNote>Nothing stands in the way: this can open.</SettledNote> : null}
    </div>
  );
}
