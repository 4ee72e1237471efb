import type { Shape, Tone } from '@/components/ui';
import type { Label } from '@/lib/harmony/reading';

/** How a label's state looks and what it is called. `asked` is a blank that waits for an answer. */
export interface LabelLook {
  readonly shape: Shape;
  readonly tone: Tone;
  readonly word: string;
}

const LOOKS = {
  suggested: { shape: 'ring', tone: 'open', word: 'suggested' },
  accepted: { shape: 'check', tone: 'settled', word: 'accepted' },
  changed: { shape: 'diamond', tone: 'settled', word: 'written by hand' },
  blank: { shape: 'dash', tone: 'plain', word: 'blank' },
} as const satisfies Record<string, LabelLook>;

export function lookOf(label: Label): LabelLook {
  return LOOKS[label.numeral ? label.state : 'blank'];
}

/** Settled: a person has said yes or written it. Blanks and suggestions are open. */
export function isSettled(label: Label): boolean {
  return label.numeral !== null && label.state !== 'suggested';
}
