'use client';

import Link from 'next/link';
import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { classNames } from './class-names';

interface MenuProps {
  /** The button that opens it; must take a ref (Button does). */
  readonly trigger: ReactNode;
  readonly align?: 'start' | 'end';
  readonly children: ReactNode;
}

/** A menu of actions. Its children are MenuAction, MenuLink, MenuDownload, MenuChoice, MenuRule and MenuHeading. */
export function Menu({ trigger, align = 'end', children }: MenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align={align}
          sideOffset={6}
          collisionPadding={8}
          className="z-50 max-h-(--radix-dropdown-menu-content-available-height) min-w-48 overflow-y-auto rounded-plate border border-ink bg-sheet py-1 text-ink"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

const ROW =
  'flex min-h-8 w-full items-center gap-2 px-3.5 py-1 text-base outline-none select-none data-highlighted:bg-selection ' +
  'data-disabled:text-ink-soft data-disabled:italic';

interface MenuActionProps {
  readonly onSelect: () => void;
  readonly danger?: boolean;
  readonly disabled?: boolean;
  readonly children: ReactNode;
}

export function MenuAction({ onSelect, danger = false, disabled = false, children }: MenuActionProps) {
  return (
    <DropdownMenu.Item disabled={disabled} onSelect={onSelect} className={classNames(ROW, danger && 'text-madder')}>
      {children}
    </DropdownMenu.Item>
  );
}

export function MenuLink({ href, children }: { readonly href: string; readonly children: ReactNode }) {
  return (
    <DropdownMenu.Item asChild>
      <Link href={href} className={ROW}>{children}</Link>
    </DropdownMenu.Item>
  );
}

/** A file to take along; the browser saves it. */
export function MenuDownload({ href, children }: { readonly href: string; readonly children: ReactNode }) {
  return (
    <DropdownMenu.Item asChild>
      <a href={href} download className={ROW}>{children}</a>
    </DropdownMenu.Item>
  );
}

interface MenuChoiceProps {
  readonly value: string;
  readonly onValueChange: (value: string) => void;
  readonly choices: readonly { readonly value: string; readonly label: string }[];
}

/** One choice of several; the chosen one bears a disc. */
export function MenuChoice({ value, onValueChange, choices }: MenuChoiceProps) {
  return (
    <DropdownMenu.RadioGroup value={value} onValueChange={onValueChange}>
      {choices.map((choice) => (
        <DropdownMenu.RadioItem key={choice.value} value={choice.value} className={classNames(ROW, 'pl-8 relative')}>
          <DropdownMenu.ItemIndicator className="absolute left-3.5 size-2 rounded-full bg-ink" />
          {choice.label}
        </DropdownMenu.RadioItem>
      ))}
    </DropdownMenu.RadioGroup>
  );
}

export function MenuRule() {
  return <DropdownMenu.Separator className="my-1 h-px bg-rule" />;
}

export function MenuHeading({ children }: { readonly children: ReactNode }) {
  return <DropdownMenu.Label className="caps px-3.5 pt-1.5 pb-0.5 text-small text-ink-soft">{children}</DropdownMenu.Label>;
}
