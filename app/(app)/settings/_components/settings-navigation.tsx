'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';

const PAGES = [
  { href: '/settings', label: 'Department' },
  { href: '/settings/members', label: 'Members' },
  { href: '/settings/audit', label: 'Audit trail' },
] as const;

export function SettingsNavigation() {
  const pathname = usePathname();
  return (
    <nav aria-label="Settings" className="mb-8 border-b border-rule">
      <ul className="flex flex-wrap gap-x-6">
        {PAGES.map(({ href, label }) => (
          <li key={href}>
            <Link
              href={href}
              aria-current={pathname === href ? 'page' : undefined}
              className="-mb-px block border-b-2 border-transparent py-2 text-ink-soft hover:text-ink aria-[current]:border-ink aria-[current]:text-ink"
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
