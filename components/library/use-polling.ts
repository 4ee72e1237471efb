'use client';

import { useEffect, useRef } from 'react';

const FIRST_WAIT_MS = 700;
const LONGEST_WAIT_MS = 8_000;

/**
 * Asks again and again while `active`, at first quickly, then ever more slowly, and not at all while the page is hidden.
 * `ask` says whether anything changed: then the waits start short again. A failed try waits longer.
 */
export function usePolling(active: boolean, ask: () => Promise<boolean>): void {
  const latest = useRef(ask);
  useEffect(() => {
    latest.current = ask;
  });
  useEffect(() => {
    if (!active) return undefined;
    let wait = FIRST_WAIT_MS;
    let stopped = false;
    let timer: ReturnType<typeof setTimeout>;
    const turn = async () => {
      const changed = document.hidden ? false : await latest.current().catch(() => false);
      wait = changed ? FIRST_WAIT_MS : Math.min(wait * 1.6, LONGEST_WAIT_MS);
      if (!stopped) timer = setTimeout(() => void turn(), wait);
    };
    timer = setTimeout(() => void turn(), wait);
    return () => {
      stopped = true;
      clearTimeout(timer);
    };
  }, [active]);
}
