'use server';

import { isStaff } from '@/lib/auth/permissions';
import { action, formAction } from '@/lib/http/action';
import {
  acceptAlternativeInput,
  assignmentInput,
  changeAssignmentInput,
  createAssignmentInput,
  dropAlternativeInput,
  setQuestionsInput,
} from '@/lib/workflows/assignment-input';
import { changeAssignment } from '@/lib/workflows/change-assignment';
import { createAssignment as createAssignmentWorkflow } from '@/lib/workflows/create-assignment';
import { closeAssignment, deleteAssignment, openAssignment } from '@/lib/workflows/open-assignment';
import { acceptAlternative, dropAlternative, setQuestions } from '@/lib/workflows/set-questions';

const prepare = {
  can: isStaff,
  revalidate: ({ assignmentId }: { readonly assignmentId: string }) => [`/assignments/${assignmentId}`, `/assignments/${assignmentId}/marking`],
};

export const createAssignment = formAction(
  {
    name: 'assignments.create',
    can: isStaff,
    input: createAssignmentInput,
    revalidate: ({ courseId }) => [`/courses/${courseId}`],
  },
  createAssignmentWorkflow,
);
export const change = action({ name: 'assignments.change', input: changeAssignmentInput, ...prepare }, changeAssignment);
export const ask = action({ name: 'assignments.ask', input: setQuestionsInput, ...prepare }, setQuestions);
export const accept = action({ name: 'assignments.accept_alternative', input: acceptAlternativeInput, ...prepare }, acceptAlternative);
export const drop = action({ name: 'assignments.drop_alternative', input: dropAlternativeInput, ...prepare }, dropAlternative);
export const open = action({ name: 'assignments.open', input: assignmentInput, ...prepare }, openAssignment);
export const close = action({ name: 'assignments.close', input: assignmentInput, ...prepare }, closeAssignment);
export const remove = action(
  { name: 'assignments.delete', can: isStaff, input: assignmentInput, revalidate: ({ courseId }) => [`/courses/${courseId}`] },
  deleteAssignment,
);
