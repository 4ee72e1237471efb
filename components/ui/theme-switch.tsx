'use client';

import { useState } from 'react';
import { Button } from './button';
import { Menu, MenuChoice } from './menu';

export const THEMES = ['system', 'day', 'night'] as const;
export type Theme = (typeof THEMES)[number];

const YEAR_S = 365 * 24 * 60 * 60;
const CHOICES = [
  { value: 'system', label: 'As the device' },
  { value: 'day', label: 'Day' },
  { value: 'night', label: 'Night' },
] as const;

/** The choice lives in a cookie, so that the server's first byte already wears it: nothing flashes. */
export function ThemeSwitch({ theme }: { readonly theme: Theme }) {
  const [chosen, setChosen] = useState<string>(theme);
  const choose = (next: string) => {
    setChosen(next);
    document.cookie = `theme=${next}; path=/; max-age=${YEAR_S}; samesite=lax`;
    if (next === 'system') delete document.documentElement.dataset['theme'];
    else document.documentElement.dataset['theme'] = next;
  };
  return (
    <Menu
      trigger={
        <Button kind="quiet" size="icon" aria-label="Day or night">
          <HalfSun />
        </Button>
      }
    >
      <MenuChoice value={chosen} onValueChange={choose} choices={CHOICES} />
    </Menu>
  );
}

function HalfSun() {
  return (
    <svg viewBox="0 0 20 20" aria-hidden="true" className="size-5" fill="none" stroke="currentColor" strokeWidth="1.2">
      <circle cx="10" cy="10" r="6.5" />
      <path d="M10 3.5a6.5 6.5 0 0 1 0 13z" fill="currentColor" stroke="none" />
    </svg>
  );
}
