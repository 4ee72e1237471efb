'use client';

import { type RefObject, useEffect, useMemo, useState } from 'react';

/** How far beyond the window a sheet is engraved in advance. */
const AHEAD = '900px 0px';

/**
 * Indices of the sheets to keep engraved: those near the window, and the held one. Each sheet's element bears
 * `data-sheet`; one sheet alone is always kept.
 */
export function useNearSheets(region: RefObject<HTMLElement | null>, count: number, held: number): ReadonlySet<number> {
  const [seen, setSeen] = useState<ReadonlySet<number>>(new Set());

  useEffect(() => {
    if (count < 2 || !region.current) return;
    const observer = new IntersectionObserver((entries) => setSeen((before) => follow(before, entries)), { rootMargin: AHEAD });
    for (const sheet of region.current.querySelectorAll('[data-sheet]')) observer.observe(sheet);
    return () => observer.disconnect();
  }, [region, count]);

  return useMemo(() => new Set([...(count < 2 ? [0] : seen), ...(held >= 0 ? [held] : [])]), [count, seen, held]);
}

function follow(before: ReadonlySet<number>, entries: readonly IntersectionObserverEntry[]): Set<number> {
  const after = new Set(before);
  for (const entry of entries) {
    const index = Number((entry.target as HTMLElement).dataset['sheet']);
    if (entry.isIntersecting) after.add(index);
    else after.delete(index);
  }
  return after;
}
