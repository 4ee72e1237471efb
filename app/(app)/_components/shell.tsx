import Link from 'next/link';
import type { ReactNode } from 'react';
import { type Theme, ThemeSwitch, Wordmark } from '@/components/ui';
import type { Role } from '@/lib/vocabularies';
import { AccountMenu } from './account-menu';
import { Navigation, type Place } from './navigation';

const LIBRARY: Place = { href: '/library', label: 'Library', covers: ['library', 'scores', 'excerpts', 'desk', 'handouts'] };
const COURSES: Place = { href: '/courses', label: 'Courses', covers: ['courses', 'assignments', 'submissions'] };
const MY_WORK: Place = { ...COURSES, label: 'My work' };
const SETTINGS: Place = { href: '/settings', label: 'Settings', covers: ['settings'] };

const PLACES: Readonly<Record<Role, readonly Place[]>> = {
  owner: [LIBRARY, COURSES, SETTINGS],
  instructor: [LIBRARY, COURSES],
  assistant: [LIBRARY, COURSES],
  student: [MY_WORK],
};

interface ShellProps {
  readonly departmentName: string;
  readonly person: { readonly name: string; readonly role: Role };
  readonly theme: Theme;
  readonly children: ReactNode;
}

/** The frame of every signed-in page: skip link, header, and the page in <main id="page">. */
export function Shell({ departmentName, person, theme, children }: ShellProps) {
  return (
    <>
      <a href="#page" className="sr-only z-60 bg-ink px-3 py-2 text-paper focus:not-sr-only focus:fixed focus:top-2 focus:left-2">
        Skip to the page
      </a>
      <header className="border-b border-rule-strong bg-paper print:hidden">
        <div className="sheet flex h-header items-center gap-x-3 sm:gap-x-6">
          <Link href="/" aria-label="Understave: start" className="flex min-h-9 shrink-0 items-center">
            <Wordmark small />
          </Link>
          <p className="hidden min-w-0 truncate border-l border-rule-strong pl-6 font-book text-ink-soft italic lg:block">{departmentName}</p>
          <Navigation places={PLACES[person.role]} />
          <div className="ml-auto flex items-center gap-1">
            <ThemeSwitch theme={theme} />
            <AccountMenu name={person.name} role={person.role} />
          </div>
        </div>
      </header>
      <main id="page" tabIndex={-1} className="outline-none">{children}</main>
    </>
  );
}
