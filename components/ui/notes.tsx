import type { ReactNode } from 'react';
import { classNames } from './class-names';
import { type Shape, ShapeIcon } from './shape';
import { TONE_TEXT, type Tone } from './state-mark';

interface EmptyStateProps {
  readonly title: ReactNode;
  /** What belongs here and how it comes to be. */
  readonly children?: ReactNode;
  readonly action?: ReactNode;
}

/** What stands where nothing is yet: an empty staff, a sentence that teaches, and the way on. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-center gap-3 border-y border-rule px-4 py-12 text-center">
      <EmptyStaff />
      <h2 className="text-lead">{title}</h2>
      {children ? <div className="measure text-ink-soft">{children}</div> : null}
      {action ? <div className="mt-2 flex flex-wrap justify-center gap-2">{action}</div> : null}
    </div>
  );
}

function EmptyStaff() {
  return (
    <svg viewBox="0 0 160 40" aria-hidden="true" className="mb-1 w-40 text-rule-strong" fill="none" stroke="currentColor" strokeWidth="0.8">
      <path d="M0 8.5h160M0 14.5h160M0 20.5h160M0 26.5h160M0 32.5h160M.5 8.5v24M80.5 8.5v24M156.5 8.5v24" />
      <path d="M159 8.5v24" strokeWidth="2" />
    </svg>
  );
}

interface NoteProps {
  readonly title?: ReactNode;
  readonly children?: ReactNode;
  readonly action?: ReactNode;
  readonly className?: string;
}

/** Something went wrong: what, where, and what to do. Announced when it appears. */
export function ErrorNote(props: NoteProps) {
  return <NoteFrame {...props} tone="eye" shape="cross" role="alert" />;
}

/** Something a person should know that stops nothing. */
export function WarningNote(props: NoteProps) {
  return <NoteFrame {...props} tone="open" shape="triangle" />;
}

/** Something that went well and should stay on the page. */
export function SettledNote(props: NoteProps) {
  return <NoteFrame {...props} tone="settled" shape="check" role="status" />;
}

const EDGE: Readonly<Record<Tone, string>> = {
  eye: 'border-madder bg-madder-wash',
  settled: 'border-verdigris bg-verdigris-wash',
  open: 'border-ochre bg-ochre-wash',
  plain: 'border-rule-strong bg-bench',
};

interface NoteFrameProps extends NoteProps {
  readonly tone: Tone;
  readonly shape: Shape;
  readonly role?: 'alert' | 'status';
}

function NoteFrame({ title, children, action, className, tone, shape, role }: NoteFrameProps) {
  return (
    <div role={role} className={classNames('flex items-baseline gap-2.5 border-l-2 px-3.5 py-2', EDGE[tone], className)}>
      <ShapeIcon shape={shape} className={TONE_TEXT[tone]} />
      <div className="min-w-0 flex-1">
        {title ? <p className="font-medium">{title}</p> : null}
        {children ? <div className={title ? 'text-small' : undefined}>{children}</div> : null}
      </div>
      {action ? <div className="shrink-0">{action}</div> : null}
    </div>
  );
}
