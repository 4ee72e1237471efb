import { Mark, type Shape, type Tone } from '@/components/ui';
import { VERDICT_NAMES, type Verdict } from '@/lib/marking/verdict';

interface VerdictLook {
  readonly tone: Tone;
  readonly shape: Shape;
}

/** Each verdict has an outline of its own: they are told apart in one colour too. */
export const VERDICT_LOOKS: Readonly<Record<Verdict, VerdictLook>> = {
  'as-keyed': { tone: 'settled', shape: 'check' },
  alternative: { tone: 'settled', shape: 'diamond' },
  'other-frame': { tone: 'settled', shape: 'disc' },
  partly: { tone: 'open', shape: 'half' },
  'not-this': { tone: 'eye', shape: 'cross' },
  blank: { tone: 'plain', shape: 'dash' },
};

export function VerdictMark({ verdict, className }: { readonly verdict: Verdict; readonly className?: string }) {
  return <Mark {...VERDICT_LOOKS[verdict]} {...(className ? { className } : {})}>{VERDICT_NAMES[verdict]}</Mark>;
}
