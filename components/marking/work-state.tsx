import { Mark, StateMark } from '@/components/ui';
import type { AssignmentState, SubmissionState } from '@/lib/vocabularies';

export function AssignmentStateMark({ state }: { readonly state: AssignmentState }) {
  return <StateMark state={state} />;
}

/** How far a student is with an assignment; null: not begun. */
export function WorkStateMark({ state }: { readonly state: SubmissionState | null }) {
  if (state === null) return <Mark tone="plain" shape="dash">not begun</Mark>;
  if (state === 'working') return <StateMark state="working" />;
  if (state === 'released') return <StateMark state="released">marked</StateMark>;
  return <Mark tone="settled" shape="check">handed in</Mark>;
}
