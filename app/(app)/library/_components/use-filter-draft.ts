'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { hrefOf } from '../address';
import type { LibraryQuery } from '../filter';

const TYPING_PAUSE_MS = 350;

export type Facets = Pick<LibraryQuery, 'q' | 'composer' | 'key' | 'state' | 'by' | 'diminished'>;

export interface FilterDraft {
  readonly draft: LibraryQuery;
  /** Changes the view; the address follows at once, or for `typing` after a pause. */
  readonly change: (facets: Partial<Facets>, how?: 'typing') => void;
}

/**
 * The controls run ahead of the page: what is typed stays while the list for it is fetched. A view that was not asked
 * for here (a link, the way back) is taken over by the controls.
 */
export function useFilterDraft(view: LibraryQuery): FilterDraft {
  const router = useRouter();
  const [draft, setDraft] = useState(view);
  const [shown, setShown] = useState(hrefOf(view, {}));
  const [asked, setAsked] = useState<readonly string[]>([]);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const arrived = hrefOf(view, {});
  if (arrived !== shown) {
    setShown(arrived);
    if (asked.includes(arrived)) setAsked(asked.slice(asked.indexOf(arrived) + 1));
    else setDraft(view);
  }
  const change = (facets: Partial<Facets>, how?: 'typing') => {
    const next = { ...draft, ...facets };
    // A space at the end is the start of the next word: it asks for nothing new.
    const address = hrefOf(next, { q: next.q.trim() });
    setDraft(next);
    clearTimeout(timer.current);
    if (address === shown) return;
    timer.current = setTimeout(() => {
      setAsked((all) => [...all, address]);
      router.replace(address, { scroll: false });
    }, how === 'typing' ? TYPING_PAUSE_MS : 0);
  };
  return { draft, change };
}
