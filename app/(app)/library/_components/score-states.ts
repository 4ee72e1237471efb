import { formatPlace } from '@/components/library/uploads';

export interface ScoreState {
  readonly scoreId: string;
  readonly title: string;
  readonly state: string;
  /** Why it was refused; null when it was not. */
  readonly problem: string | null;
  readonly place: string | null;
}

interface StateAnswer {
  readonly id: string;
  readonly title: string;
  readonly state: string;
  readonly refusal: { readonly message: string; readonly line?: number; readonly element?: string } | null;
}

export function isInWork(state: string): boolean {
  return state === 'queued' || state === 'reading';
}

/** Asks /api/scores/states; rejects when the server does not answer. */
export async function fetchScoreStates(scoreIds: readonly string[]): Promise<readonly ScoreState[]> {
  const answer = await fetch(`/api/scores/states?ids=${scoreIds.join(',')}`);
  if (!answer.ok) throw new Error(`states: ${answer.status}`);
  const states = (await answer.json()) as readonly StateAnswer[];
  return states.map(({ id, title, state, refusal }) => ({
    scoreId: id,
    title,
    state,
    problem: state === 'refused' ? (refusal?.message ?? 'The file was refused.') : null,
    place: state === 'refused' ? formatPlace(refusal?.line, refusal?.element) : null,
  }));
}
