import { type Change, equalNumerals, equalRegions } from './edit';
import type { Label, Reading } from './reading';

/**
 * A student's reading holds no proposals: nothing suggested, no certainty, no runners-up. What is left of each label is
 * its span, its key, and what is given or the student wrote.
 */
export function asAnswers(reading: Reading): Reading {
  return { ...reading, labels: reading.labels.map(asAnswer) };
}

function asAnswer(label: Label): Label {
  const isProposal = label.state === 'suggested';
  return { ...label, numeral: isProposal ? null : label.numeral, state: isProposal ? 'changed' : label.state, certainty: null, others: [] };
}

/** A key as a student may see it once it is shown: its numerals, and nothing of how they came about. */
export function asPrinted(reading: Reading): Reading {
  return { ...reading, labels: reading.labels.map((label) => ({ ...label, state: 'accepted', certainty: null, others: [] })) };
}

/** What an assignment lets a student change. */
export interface AnswerRules {
  /** Spans are given: only numerals may be written. Open: spans too. */
  readonly spansGiven: boolean;
  readonly keysGiven: boolean;
  /** Starts of the asked spans, when spans are given; empty: all are asked. */
  readonly askedStarts: readonly number[];
}

/** Why a student may not make a change; empty when they may. */
export function checkAnswer(change: Change, rules: AnswerRules): string[] {
  const { before, after } = change.labels;
  const faults: string[] = [];
  if (after.some((l) => l.state === 'suggested' || l.certainty !== null || l.others.length > 0)) faults.push('An answer is not a proposal.');
  if (rules.keysGiven && changesKeys(change)) faults.push('The keys are given in this assignment.');
  if (!rules.spansGiven) return faults;
  if (before.length !== after.length || !after.every((l) => before.some((b) => sameSpan(b, l)))) faults.push('The spans are given in this assignment.');
  const asked = new Set(rules.askedStarts);
  if (asked.size > 0 && after.some((l) => !asked.has(l.start) && changesNumeral(l, before))) faults.push('This label is given and not asked.');
  return faults;
}

function changesKeys({ regions }: Change): boolean {
  return regions.before.length !== regions.after.length || !regions.after.every((r) => regions.before.some((b) => equalRegions(b, r)));
}

function sameSpan(a: Label, b: Label): boolean {
  return a.id === b.id && a.start === b.start && a.end === b.end;
}

function changesNumeral(label: Label, before: readonly Label[]): boolean {
  const was = before.find((b) => b.id === label.id);
  return !was || !equalNumerals(was.numeral, label.numeral);
}
