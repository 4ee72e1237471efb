import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names';

interface TableProps {
  /** Spoken, and shown when `captionShown`. */
  readonly caption: ReactNode;
  readonly captionShown?: boolean;
  readonly className?: string;
  readonly children: ReactNode;
}

/** A ruled table that scrolls sideways within its own region when the page is narrow. */
export function Table({ caption, captionShown = false, className, children }: TableProps) {
  return (
    <div className="relative overflow-x-auto" role="region" aria-label={typeof caption === 'string' ? caption : undefined} tabIndex={0}>
      <table className={classNames('w-full border-collapse border-y border-rule-strong text-base', className)}>
        <caption className={captionShown ? 'caps pb-1 text-left text-small text-ink-soft' : 'sr-only'}>{caption}</caption>
        {children}
      </table>
    </div>
  );
}

export function Row({ className, ...rest }: ComponentProps<'tr'>) {
  return <tr {...rest} className={classNames('border-t border-rule first:border-t-0', className)} />;
}

export function Th({ className, scope = 'col', ...rest }: ComponentProps<'th'>) {
  return (
    <th
      {...rest}
      scope={scope}
      className={classNames(
        scope === 'col'
          ? 'caps border-b border-rule-strong px-2 py-1.5 text-left text-small whitespace-nowrap text-ink-soft first:pl-0 last:pr-0'
          : 'px-2 py-2 text-left align-baseline font-medium first:pl-0',
        className,
      )}
    />
  );
}

export function Td({ className, ...rest }: ComponentProps<'td'>) {
  return <td {...rest} className={classNames('px-2 py-2 align-baseline first:pl-0 last:pr-0', className)} />;
}

export type SortDirection = 'ascending' | 'descending';

interface SortThProps {
  readonly direction: SortDirection | null;
  /** A link or a button that sorts by this column; its words are the column's head. */
  readonly children: ReactNode;
  readonly className?: string;
}

/** A column head that sorts. The arrow shows the direction; aria-sort says it. */
export function SortTh({ direction, children, className }: SortThProps) {
  return (
    <Th aria-sort={direction ?? 'none'} {...(className ? { className } : {})}>
      <span className="inline-flex items-center gap-1 [&>a]:min-h-6 [&>a]:content-center [&>a:hover]:text-ink [&>button:hover]:text-ink">
        {children}
        <svg aria-hidden="true" viewBox="0 0 8 10" className={classNames('w-2', direction === null && 'opacity-0', direction === 'descending' && 'rotate-180')}>
          <path d="M4 9V1M1 4l3-3 3 3" fill="none" stroke="currentColor" strokeWidth="1.2" />
        </svg>
      </span>
    </Th>
  );
}
