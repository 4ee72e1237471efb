'use client';

import { type ReactNode, createContext, useContext, useId } from 'react';
import { classNames } from './class-names';
import { ShapeIcon } from './shape';

interface FieldIds {
  readonly id: string;
  readonly 'aria-describedby': string | undefined;
  readonly 'aria-invalid': true | undefined;
  readonly required: boolean | undefined;
}

const FieldContext = createContext<FieldIds | null>(null);

/** Ids that tie a control to its Field's label, hint and error; empty outside a Field. */
export function useFieldIds(): Partial<FieldIds> {
  return useContext(FieldContext) ?? {};
}

interface FieldProps {
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  readonly error?: string | undefined;
  readonly required?: boolean;
  /** The label is spoken but not shown. */
  readonly labelHidden?: boolean;
  readonly className?: string;
  readonly children: ReactNode;
}

/** Label, control, hint and error of one form field. The control inside (Input, TextArea, Select) finds its ids by itself. */
export function Field({ label, hint, error, required, labelHidden = false, className, children }: FieldProps) {
  const id = useId();
  const described = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');
  const ids: FieldIds = {
    id,
    'aria-describedby': described || undefined,
    'aria-invalid': error ? true : undefined,
    required: required || undefined,
  };
  return (
    <div className={classNames('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className={labelHidden ? 'sr-only' : 'text-small font-medium text-ink'}>
        {label}
        {required ? <span className="font-normal text-ink-soft"> (needed)</span> : null}
      </label>
      <FieldContext value={ids}>{children}</FieldContext>
      {hint ? <p id={`${id}-hint`} className="text-micro text-ink-soft">{hint}</p> : null}
      {error ? <FieldError id={`${id}-error`}>{error}</FieldError> : null}
    </div>
  );
}

function FieldError({ id, children }: { readonly id: string; readonly children: string }) {
  return (
    <p id={id} className="flex items-baseline gap-1.5 text-small text-madder">
      <ShapeIcon shape="cross" />
      {children}
    </p>
  );
}
