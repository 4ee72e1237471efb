'use client';

import { Tabs as Parts } from 'radix-ui';
import type { ReactNode } from 'react';

interface TabsProps {
  readonly label: string;
  readonly tabs: readonly { readonly value: string; readonly label: ReactNode; readonly content: ReactNode }[];
  readonly value?: string;
  readonly onValueChange?: (value: string) => void;
}

/** Tabs on a rule; the open one interrupts it. Uncontrolled (first tab open) unless `value` is given. */
export function Tabs({ label, tabs, value, onValueChange }: TabsProps) {
  const control = value === undefined ? { defaultValue: tabs[0]?.value ?? '' } : { value };
  return (
    <Parts.Root {...control} {...(onValueChange ? { onValueChange } : {})}>
      <Parts.List aria-label={label} className="flex gap-1 overflow-x-auto border-b border-rule-strong">
        {tabs.map((tab) => (
          <Parts.Trigger
            key={tab.value}
            value={tab.value}
            className="-mb-px min-h-9 border border-transparent px-2.5 text-base whitespace-nowrap text-ink-soft hover:text-ink data-[state=active]:border-rule-strong data-[state=active]:border-b-paper data-[state=active]:bg-paper data-[state=active]:text-ink"
          >
            {tab.label}
          </Parts.Trigger>
        ))}
      </Parts.List>
      {tabs.map((tab) => (
        <Parts.Content key={tab.value} value={tab.value} className="pt-4">{tab.content}</Parts.Content>
      ))}
    </Parts.Root>
  );
}
