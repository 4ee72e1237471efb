'use client';

import type { ComponentProps } from 'react';
import { classNames } from './class-names';
import { useFieldIds } from './field';

const CONTROL =
  'w-full min-w-0 rounded-plate border border-rule-strong bg-sheet px-2.5 text-base text-ink placeholder:text-ink-soft placeholder:italic ' +
  'hover:border-ink aria-invalid:border-madder aria-invalid:border-2 disabled:bg-bench disabled:text-ink-soft';

/** A one-line text control. Inside a Field it takes the field's id, hint and error. */
export function Input({ className, type = 'text', ...rest }: ComponentProps<'input'>) {
  return <input {...useFieldIds()} type={type} {...rest} className={classNames(CONTROL, 'min-h-9 py-1', className)} />;
}

export function TextArea({ className, rows = 4, ...rest }: ComponentProps<'textarea'>) {
  return <textarea {...useFieldIds()} rows={rows} {...rest} className={classNames(CONTROL, 'resize-y py-1.5', className)} />;
}

/** The platform's own select: it works with any keyboard, screen reader and phone. Options are its children. */
export function Select({ className, children, ...rest }: ComponentProps<'select'>) {
  return (
    <span className={classNames('relative block', className)}>
      <select {...useFieldIds()} {...rest} className={classNames(CONTROL, 'min-h-9 appearance-none py-1 pr-8')}>
        {children}
      </select>
      <svg aria-hidden="true" viewBox="0 0 10 6" className="pointer-events-none absolute top-1/2 right-2.5 w-2.5 -translate-y-1/2">
        <path d="M1 1l4 4 4-4" fill="none" stroke="currentColor" strokeWidth="1.2" />
      </svg>
    </span>
  );
}
