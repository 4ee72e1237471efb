import type { Label } from '../harmony/reading';
import { HANDOUT_KINDS, type HandoutKind, type HandoutTexts, PAPERS, type Paper, STAFF_SIZES, type StaffSize } from './order';

export { HANDOUT_KINDS, PAPERS, STAFF_SIZES };

/** Which labels a worksheet asks for. */
export const ASKED_CHOICES = ['all', 'applied', 'sevenths', 'chosen'] as const;
export type AskedChoice = (typeof ASKED_CHOICES)[number];

/** What a person chose for a print. `chosen` holds label ids and counts with `asked: 'chosen'` only. */
export interface PrintOptions extends HandoutTexts {
  readonly kind: HandoutKind;
  readonly paper: Paper;
  readonly staffSize: StaffSize;
  readonly keysGiven: boolean;
  readonly asked: AskedChoice;
  readonly chosen: readonly string[];
}

/** Ids of the labels that the choice asks for; a label without a numeral is asked for only when it was chosen by hand. */
export function askedLabels(labels: readonly Label[], options: Pick<PrintOptions, 'asked' | 'chosen'>): Set<string> {
  const chosen = new Set(options.chosen);
  return new Set(labels.filter((label) => isAsked(label, options.asked, chosen)).map((label) => label.id));
}

function isAsked(label: Label, asked: AskedChoice, chosen: ReadonlySet<string>): boolean {
  if (asked === 'chosen') return chosen.has(label.id);
  if (!label.numeral) return false;
  if (asked === 'applied') return label.numeral.applied.length > 0;
  if (asked === 'sevenths') return /seventh|ninth/.test(label.numeral.quality);
  return true;
}
