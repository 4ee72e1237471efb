'use client';

import { useState } from 'react';
import { WorkStateMark } from '@/components/marking/work-state';
import { Button, Field, Mark, Select } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import type { MarkedAssignment, StudentView } from './marking-views';
import { StudentSheet } from './student-sheet';

interface ByStudentProps {
  readonly assignment: MarkedAssignment;
  readonly students: readonly StudentView[];
  readonly remarks: readonly string[];
  readonly opened: string | null;
}

/** One student's whole work on the score. */
export function ByStudent({ assignment, students, remarks, opened }: ByStudentProps) {
  const [chosen, setChosen] = useState(opened ?? students[0]?.submissionId ?? '');
  const at = Math.max(0, students.findIndex((student) => student.submissionId === chosen));
  const student = students[at];
  if (!student) return null;
  const go = (step: number) => setChosen(students[at + step]?.submissionId ?? chosen);
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-wrap items-end gap-x-5 gap-y-3">
        <Field label="Student" className="w-72 max-w-full">
          <Select value={student.submissionId} onChange={(event) => setChosen(event.target.value)}>
            {students.map((one) => <option key={one.submissionId} value={one.submissionId}>{one.name}</option>)}
          </Select>
        </Field>
        <span className="flex gap-2 pb-px">
          <Button onClick={() => go(-1)} disabled={at === 0}>Before</Button>
          <Button onClick={() => go(1)} disabled={at === students.length - 1}>Next</Button>
        </span>
        <p className="flex flex-wrap items-baseline gap-x-4 pb-1.5">
          <strong className="tabular text-lead font-medium">{formatPoints(student.points)} of {formatPoints(student.maxPoints)}</strong>
          <WorkStateMark state={student.state} />
          {student.late ? <Mark tone="eye" shape="triangle">late</Mark> : null}
          <span className="text-small text-ink-soft">attempt {student.attempt}, {student.settled} of {student.answers.length} looked at</span>
        </p>
      </div>
      <StudentSheet key={student.submissionId} assignment={assignment} student={student} remarks={remarks} />
    </div>
  );
}
