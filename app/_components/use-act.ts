'use client';

import { useState } from 'react';
import { useAnnouncer } from '@/components/ui';
import type { Outcome } from '@/lib/http/run';

/** Runs a row's action: busy meanwhile, then says how it went. */
export function useAct(): readonly [busy: boolean, act: (work: () => Promise<Outcome<unknown>>, done: string) => Promise<boolean>] {
  const { announce, warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const act = async (work: () => Promise<Outcome<unknown>>, done: string): Promise<boolean> => {
    setBusy(true);
    const outcome = await work().catch(() => null);
    setBusy(false);
    if (outcome?.ok) announce(done);
    else warn(outcome?.error.message ?? 'The server did not answer. Nothing was changed.');
    return outcome?.ok === true;
  };
  return [busy, act];
}
