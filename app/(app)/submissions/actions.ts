'use server';

import { canBeHere, isStaff } from '@/lib/auth/permissions';
import { action } from '@/lib/http/action';
import { assignmentInput } from '@/lib/workflows/assignment-input';
import { collectSubmissions, handIn as handInWorkflow } from '@/lib/workflows/hand-in';
import { markAgain } from '@/lib/workflows/mark-again';
import { overrideMarks, settleMarks, writeRemark } from '@/lib/workflows/override-marks';
import { releaseMarks } from '@/lib/workflows/release-marks';
import { startSubmission } from '@/lib/workflows/start-submission';
import {
  handInInput,
  overrideMarksInput,
  releaseMarksInput,
  settleMarksInput,
  startSubmissionInput,
  writeRemarkInput,
} from '@/lib/workflows/submission-input';

const marking = {
  can: isStaff,
  revalidate: ({ assignmentId }: { readonly assignmentId: string }) => [`/assignments/${assignmentId}`, `/assignments/${assignmentId}/marking`],
};

export const start = action(
  { name: 'submissions.start', can: canBeHere, input: startSubmissionInput, revalidate: () => ['/courses'] },
  startSubmission,
);
export const handIn = action(
  {
    name: 'submissions.hand_in',
    can: canBeHere,
    input: handInInput,
    revalidate: ({ submissionId, assignmentId }) => ['/courses', `/submissions/${submissionId}`, `/assignments/${assignmentId}`],
  },
  handInWorkflow,
);
export const collect = action({ name: 'submissions.collect', input: assignmentInput, ...marking }, collectSubmissions);
export const override = action({ name: 'marks.override', input: overrideMarksInput, ...marking }, overrideMarks);
export const remark = action({ name: 'marks.remark', input: writeRemarkInput, ...marking }, writeRemark);
export const settle = action({ name: 'marks.settle', input: settleMarksInput, ...marking }, settleMarks);
export const release = action({ name: 'marks.release', input: releaseMarksInput, ...marking }, releaseMarks);
export const again = action({ name: 'marks.again', input: assignmentInput, ...marking }, markAgain);
