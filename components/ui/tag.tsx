import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** A short word in small capitals between hairlines: a role, a kind, a facet that is on. Not for numerals. */
export function Tag({ children, className }: { readonly children: ReactNode; readonly className?: string }) {
  return (
    <span className={classNames('caps inline-block border-x border-rule-strong px-1.5 text-small leading-tight text-ink-soft whitespace-nowrap', className)}>
      {children}
    </span>
  );
}
