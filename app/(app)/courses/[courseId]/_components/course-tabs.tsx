'use client';

import { type ReactNode, useSyncExternalStore } from 'react';
import { Tabs } from '@/components/ui';

interface CourseTabsProps {
  readonly tabs: readonly { readonly value: string; readonly label: string; readonly content: ReactNode }[];
}

/** The parts of a course. The open one is in the address, so that a link and a reload lead back to it. */
export function CourseTabs({ tabs }: CourseTabsProps) {
  const hash = useSyncExternalStore(listen, () => window.location.hash.slice(1), () => '');
  const open = (tabs.find((tab) => tab.value === hash) ?? tabs[0])?.value ?? '';
  return <Tabs label="Parts of the course" tabs={tabs} value={open} onValueChange={choose} />;
}

function listen(changed: () => void): () => void {
  window.addEventListener('hashchange', changed);
  return () => window.removeEventListener('hashchange', changed);
}

/** Without a new entry in the history: back leads to the page before. */
function choose(value: string): void {
  window.history.replaceState(null, '', `#${value}`);
  window.dispatchEvent(new HashChangeEvent('hashchange'));
}
