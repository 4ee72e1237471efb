import type { KeyReading } from './key-reading';

/** Something about a key that stops an assignment from opening, or that a teacher should see before it does. */
export interface KeyFinding {
  readonly severity: 'stop' | 'look';
  readonly message: string;
  /** Starts of the labels concerned; empty when it is about the whole. */
  readonly starts: readonly number[];
}

/** What to look at before an assignment opens. `unsure` are the labels that nobody has accepted yet. */
export function checkKey(key: KeyReading, unsure: readonly number[]): KeyFinding[] {
  const asked = key.labels.filter((label) => label.asked);
  const blank = asked.filter((label) => !label.numeral).map((label) => label.start);
  const proposed = asked.filter((label) => label.numeral && unsure.includes(label.start)).map((label) => label.start);
  const worthless = asked.filter((label) => label.points !== null && !(label.points > 0)).map((label) => label.start);
  return [
    ...(asked.length === 0 ? [stop('Nothing is asked: choose the spans that students name.', [])] : []),
    ...(blank.length > 0 ? [stop('The key has no numeral where one is asked.', blank)] : []),
    ...(worthless.length > 0 ? [stop('A label that is asked must be worth more than no points.', worthless)] : []),
    ...(proposed.length > 0 ? [look('Still as the program proposed: nobody has accepted these labels of the key.', proposed)] : []),
  ];
}

function stop(message: string, starts: readonly number[]): KeyFinding {
  return { severity: 'stop', message, starts };
}

function look(message: string, starts: readonly number[]): KeyFinding {
  return { severity: 'look', message, starts };
}
