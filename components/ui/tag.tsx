import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** A short fact in small capitals between hairlines: a key, a role, a facet that is on. */
export function Tag({ children, className }: { readonly children: ReactNode; readonly className?: string }) {
  return (
    <span className={classNames('caps inline-block border-x border-rule-strong px-1.5 text-small leading-tight text-ink-soft whitespace-nowrap', className)}>
      {children}
    </span>
  );
}
