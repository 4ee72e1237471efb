'use client';

import { useEffect, useRef, useState } from 'react';
import type { PrintHandoutInput, PrintProgress } from '@/lib/workflows/print-handout';

/** What is known of the print of the present order. While a new one is made, the pages of the last stay on screen. */
export interface Print {
  readonly printId: string | null;
  readonly pages: readonly string[];
  readonly busy: boolean;
  /** A sentence; null when all is well. */
  readonly failure: string | null;
}

const SETTLE_MS = 500;
const FIRST_POLL_MS = 300;
const SLOWEST_POLL_MS = 3_000;
const NO_ANSWER = 'The server did not answer. What you wrote is kept here; try again.';

/** Orders a print whenever the order has stood still for a moment, and follows it until its pages are there. */
export function usePrint(order: PrintHandoutInput, attempt: number): Print {
  const [print, setPrint] = useState<Print>({ printId: null, pages: [], busy: true, failure: null });
  const text = JSON.stringify(order);
  const latest = useRef(0);
  useEffect(() => {
    const turn = (latest.current += 1);
    const isCurrent = () => latest.current === turn;
    setPrint((before) => ({ ...before, busy: true, failure: null }));
    const timer = setTimeout(async () => {
      const outcome = await makePrint(text, isCurrent).catch(() => ({ failure: NO_ANSWER }));
      if (!isCurrent() || outcome === null) return;
      setPrint((before) => ('failure' in outcome ? { ...before, busy: false, failure: outcome.failure } : { ...outcome, busy: false, failure: null }));
    }, SETTLE_MS);
    return () => clearTimeout(timer);
  }, [text, attempt]);
  return print;
}

type Made = { readonly printId: string; readonly pages: readonly string[] } | { readonly failure: string } | null;

async function makePrint(order: string, isCurrent: () => boolean): Promise<Made> {
  const placed = await fetch('/api/handouts', { method: 'POST', headers: { 'content-type': 'application/json' }, body: order });
  if (!placed.ok) return { failure: await failureOf(placed) };
  const { printId } = (await placed.json()) as { printId: string };
  for (let wait = FIRST_POLL_MS; isCurrent(); wait = Math.min(wait * 1.5, SLOWEST_POLL_MS)) {
    const answer = await fetch(`/api/handouts/${printId}`);
    if (!answer.ok) return { failure: await failureOf(answer) };
    const progress = (await answer.json()) as PrintProgress;
    if (progress.state === 'ready') return { printId, pages: progress.pages };
    if (progress.state === 'failed') return { failure: progress.failure ?? NO_ANSWER };
    await new Promise((resolve) => setTimeout(resolve, wait));
  }
  return null;
}

async function failureOf(response: Response): Promise<string> {
  const body = (await response.json().catch(() => null)) as { error?: { message?: string; fields?: Record<string, string> } } | null;
  const fields = Object.values(body?.error?.fields ?? {}).join(' ');
  return fields || body?.error?.message || NO_ANSWER;
}
