import type { ReactNode } from 'react';
import { classNames } from './class-names';
import { type Shape, ShapeIcon } from './shape';

export const TONES = ['eye', 'settled', 'open', 'plain'] as const;
/** `eye` needs attention (madder), `settled` (verdigris), `open` (ochre), `plain` (ink). */
export type Tone = (typeof TONES)[number];

export const TONE_TEXT: Readonly<Record<Tone, string>> = {
  eye: 'text-madder',
  settled: 'text-verdigris',
  open: 'text-ochre',
  plain: 'text-ink-soft',
};

interface StateLook {
  readonly tone: Tone;
  readonly shape: Shape;
  readonly word: string;
}

/** The states a person meets, each a shape, a word and a colour. */
export const STATES = {
  suggested: { tone: 'open', shape: 'ring', word: 'suggested' },
  accepted: { tone: 'settled', shape: 'check', word: 'accepted' },
  changed: { tone: 'settled', shape: 'diamond', word: 'changed' },
  blank: { tone: 'plain', shape: 'dash', word: 'blank' },
  open: { tone: 'open', shape: 'ring', word: 'open' },
  settled: { tone: 'settled', shape: 'disc', word: 'settled' },
  waiting: { tone: 'open', shape: 'dots', word: 'waiting' },
  working: { tone: 'open', shape: 'half', word: 'at work' },
  ready: { tone: 'settled', shape: 'check', word: 'ready' },
  refused: { tone: 'eye', shape: 'cross', word: 'refused' },
  failed: { tone: 'eye', shape: 'triangle', word: 'failed' },
  draft: { tone: 'open', shape: 'ring', word: 'draft' },
  closed: { tone: 'plain', shape: 'dash', word: 'closed' },
  released: { tone: 'settled', shape: 'disc', word: 'released' },
} as const satisfies Readonly<Record<string, StateLook>>;
export type StateName = keyof typeof STATES;

interface StateMarkProps {
  readonly state: StateName;
  /** Replaces the state's own word where a longer one helps. */
  readonly children?: ReactNode;
  /** Only the shape is shown; the word is still spoken. */
  readonly iconOnly?: boolean;
  readonly className?: string;
}

export function StateMark({ state, children, iconOnly, className }: StateMarkProps) {
  const { tone, shape, word } = STATES[state];
  return <Mark tone={tone} shape={shape} {...(iconOnly ? { iconOnly } : {})} {...(className ? { className } : {})}>{children ?? word}</Mark>;
}

interface MarkProps {
  readonly tone: Tone;
  readonly shape: Shape;
  readonly children: ReactNode;
  readonly iconOnly?: boolean;
  readonly className?: string;
}

/** Shape, word and colour for a state that is not in STATES: a verdict, a kind of warning. */
export function Mark({ tone, shape, children, iconOnly = false, className }: MarkProps) {
  return (
    <span className={classNames('inline-flex items-baseline gap-1.5 sm:whitespace-nowrap', TONE_TEXT[tone], className)}>
      <ShapeIcon shape={shape} className="translate-y-[0.05em]" />
      <span className={iconOnly ? 'sr-only' : undefined}>{children}</span>
    </span>
  );
}
