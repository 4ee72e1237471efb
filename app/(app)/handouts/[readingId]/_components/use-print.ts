'use client';

import { useEffect, useState } from 'react';
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

interface Kept extends Omit<Print, 'busy'> {
  /** The order and attempt that it answers. */
  readonly answers: string;
}

/** Orders a print whenever the order has stood still for a moment, and follows it until its pages are there. */
export function usePrint(order: PrintHandoutInput, attempt: number): Print {
  const [kept, setKept] = useState<Kept>({ answers: '', printId: null, pages: [], failure: null });
  const text = JSON.stringify(order);
  const asked = `${attempt} ${text}`;
  useEffect(() => {
    const stop = new AbortController();
    const timer = setTimeout(() => {
      void makePrint(text, stop.signal).then((made) => {
        if (stop.signal.aborted) return;
        setKept((before) => ('failure' in made ? { ...before, answers: asked, failure: made.failure } : { ...made, answers: asked, failure: null }));
      });
    }, SETTLE_MS);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [text, asked]);
  const busy = kept.answers !== asked;
  return { printId: kept.printId, pages: kept.pages, busy, failure: busy ? null : kept.failure };
}

type Made = { readonly printId: string; readonly pages: readonly string[] } | { readonly failure: string };

async function makePrint(order: string, signal: AbortSignal): Promise<Made> {
  try {
    const placed = await fetch('/api/handouts', { method: 'POST', headers: { 'content-type': 'application/json' }, body: order, signal });
    if (!placed.ok) return { failure: await failureOf(placed) };
    const { printId } = (await placed.json()) as { printId: string };
    return await followPrint(printId, signal);
  } catch {
    // Aborted (nobody looks at the answer any more), or the network is gone.
    return { failure: NO_ANSWER };
  }
}

async function followPrint(printId: string, signal: AbortSignal): Promise<Made> {
  for (let wait = FIRST_POLL_MS; ; wait = Math.min(wait * 1.5, SLOWEST_POLL_MS)) {
    const answer = await fetch(`/api/handouts/${printId}`, { signal });
    if (!answer.ok) return { failure: await failureOf(answer) };
    const progress = (await answer.json()) as PrintProgress;
    if (progress.state === 'ready') return { printId, pages: progress.pages };
    if (progress.state === 'failed') return { failure: progress.failure ?? NO_ANSWER };
    await new Promise((resolve) => setTimeout(resolve, wait));
  }
}

async function failureOf(response: Response): Promise<string> {
  const body = (await response.json().catch(() => null)) as { error?: { message?: string; fields?: Record<string, string> } } | null;
  const fields = Object.values(body?.error?.fields ?? {}).join(' ');
  return fields || body?.error?.message || NO_ANSWER;
}
