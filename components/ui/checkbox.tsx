'use client';

import { type ComponentProps, type ReactNode, useId } from 'react';
import { classNames } from './class-names';

const BOX =
  'mt-1 flex size-4.5 shrink-0 appearance-none items-center justify-center border border-rule-strong bg-sheet text-ink hover:border-ink ' +
  'checked:border-ink disabled:bg-bench before:hidden before:bg-current checked:before:block';
const TICK = 'rounded-plate before:size-3 before:[clip-path:polygon(12%_46%,0_60%,40%_96%,100%_18%,86%_6%,38%_70%)]';
const DISC = 'rounded-full before:size-2.5 before:rounded-full';

type ChoiceProps = Omit<ComponentProps<'input'>, 'type'> & { readonly label: ReactNode; readonly hint?: ReactNode };

/** A box with its label; the whole row is the target. */
export function Checkbox(props: ChoiceProps) {
  return <Choice {...props} type="checkbox" />;
}

/** One choice of several that share a `name`; put them in a Choices. */
export function Radio(props: ChoiceProps) {
  return <Choice {...props} type="radio" />;
}

function Choice({ label, hint, className, type, ...rest }: ChoiceProps & { readonly type: 'checkbox' | 'radio' }) {
  const id = useId();
  return (
    <div className={classNames('flex min-h-7 items-start gap-2', className)}>
      <input
        id={id}
        aria-describedby={hint ? `${id}-hint` : undefined}
        {...rest}
        type={type}
        className={classNames(BOX, type === 'radio' ? DISC : TICK)}
      />
      <div>
        <label htmlFor={rest.id ?? id}>{label}</label>
        {hint ? <p id={`${id}-hint`} className="text-micro text-ink-soft">{hint}</p> : null}
      </div>
    </div>
  );
}

/** A group of Checkbox or Radio with one legend. */
export function Choices({ legend, children, className }: { readonly legend: ReactNode; readonly children: ReactNode; readonly className?: string }) {
  return (
    <fieldset className={classNames('flex flex-col gap-0.5', className)}>
      <legend className="mb-1 text-small font-medium">{legend}</legend>
      {children}
    </fieldset>
  );
}
