import Link from 'next/link';
import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names';
import { Spinner } from './spinner';

export const BUTTON_KINDS = ['primary', 'plain', 'quiet', 'danger'] as const;
export type ButtonKind = (typeof BUTTON_KINDS)[number];

const KIND: Readonly<Record<ButtonKind, string>> = {
  primary: 'border-ink bg-ink text-paper hover:bg-ink-soft hover:border-ink-soft',
  plain: 'border-rule-strong bg-sheet text-ink hover:border-ink hover:bg-bench',
  quiet: 'border-transparent text-ink hover:bg-bench hover:border-rule',
  danger: 'border-madder bg-sheet text-madder hover:bg-madder-wash',
};

const SIZE = {
  normal: 'min-h-9 px-3.5 py-1 text-base',
  small: 'min-h-7 px-2.5 py-0.5 text-small',
  icon: 'size-9 p-0 text-base',
} as const;

export interface ButtonLook {
  readonly kind?: ButtonKind;
  readonly size?: keyof typeof SIZE;
}

export function buttonClass({ kind = 'plain', size = 'normal' }: ButtonLook = {}): string {
  return classNames(
    'inline-flex items-center justify-center gap-1.5 rounded-plate border font-sans font-medium whitespace-nowrap no-underline',
    'transition-colors duration-100 disabled:opacity-50 aria-disabled:opacity-50 aria-disabled:cursor-default',
    KIND[kind],
    SIZE[size],
  );
}

type ButtonProps = ComponentProps<'button'> & ButtonLook & { readonly busy?: boolean; readonly busyText?: string };

/** `busy` keeps the button's place and name, shows a spinner and takes no second press. */
export function Button({ kind, size, busy = false, busyText, className, children, type = 'button', onClick, ...rest }: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-disabled={busy || rest['aria-disabled'] || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
      className={classNames(buttonClass({ ...(kind ? { kind } : {}), ...(size ? { size } : {}) }), className)}
    >
      {busy ? <Spinner label="" /> : null}
      {busy && busyText ? busyText : children}
    </button>
  );
}

type ButtonLinkProps = ComponentProps<typeof Link> & ButtonLook & { readonly children: ReactNode };

export function ButtonLink({ kind, size, className, ...rest }: ButtonLinkProps) {
  return <Link {...rest} className={classNames(buttonClass({ ...(kind ? { kind } : {}), ...(size ? { size } : {}) }), className)} />;
}
