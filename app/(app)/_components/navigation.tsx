'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { Button, Menu, MenuLink } from '@/components/ui';

export interface Place {
  readonly href: string;
  readonly label: string;
  /** First path segments that lie under this place. */
  readonly covers: readonly string[];
}

function isHere(place: Place, pathname: string): boolean {
  return place.covers.includes(pathname.split('/')[1] ?? '');
}

/** The places of the department, in the header; below 640 px behind one button. */
export function Navigation({ places }: { readonly places: readonly Place[] }) {
  const pathname = usePathname();
  return (
    <nav aria-label="Main">
      <ul className="hidden items-stretch gap-1 sm:flex">
        {places.map((place) => (
          <li key={place.href}>
            <Link
              href={place.href}
              aria-current={isHere(place, pathname) ? 'page' : undefined}
              className="flex h-header items-center border-y-2 border-transparent px-3 text-ink-soft hover:text-ink aria-[current]:border-b-ink aria-[current]:text-ink"
            >
              {place.label}
            </Link>
          </li>
        ))}
      </ul>
      <div className="sm:hidden">
        <Menu align="start" trigger={<Button kind="quiet" size="small">{places.find((place) => isHere(place, pathname))?.label ?? 'Go to'}<Chevron /></Button>}>
          {places.map((place) => <MenuLink key={place.href} href={place.href}>{place.label}</MenuLink>)}
        </Menu>
      </div>
    </nav>
  );
}

function Chevron() {
  return (
    <svg viewBox="0 0 10 6" aria-hidden="true" className="w-2.5">
      <path d="M1 1l4 4 4-4" fill="none" stroke="currentColor" strokeWidth="1.2" />
    </svg>
  );
}
