'use client';

import { useCallback, useEffect, useState } from 'react';

/** A remark as the server shows it. */
export interface Remark {
  readonly id: string;
  readonly threadId: string | null;
  readonly labelId: string | null;
  readonly barIndex: number | null;
  readonly body: string;
  readonly by: string;
  readonly own: boolean;
  readonly resolved: boolean;
  readonly at: string;
  readonly edited: boolean;
}

export interface NewRemark {
  readonly body: string;
  readonly labelId?: string | null;
  readonly barIndex?: number | null;
  readonly threadId?: string | null;
}

export interface Remarks {
  readonly state: 'loading' | 'ready' | 'failed';
  readonly all: readonly Remark[];
  readonly canRemark: boolean;
  /** Null when it went well; else what to tell the person, whose words stay in the box. */
  add(remark: NewRemark): Promise<string | null>;
  change(remarkId: string, change: { body?: string; resolved?: boolean }): Promise<string | null>;
  takeBack(remarkId: string): Promise<string | null>;
  /** Names that can be written as `@Name`; none when they cannot be had. */
  people(): Promise<readonly string[]>;
  reload(): void;
}

/** Others' remarks are seen within this time. */
const POLL_MS = 15_000;

/** `base` is null on a desk that keeps nothing: there are no remarks then. */
export function useRemarks(base: string | null): Remarks {
  const [all, setAll] = useState<readonly Remark[]>([]);
  const [state, setState] = useState<Remarks['state']>(base === null ? 'ready' : 'loading');
  const [canRemark, setCanRemark] = useState(false);

  const call = useCallback(async (url: string, method: string, body?: unknown): Promise<string | null> => {
    const init = body === undefined ? { method } : { method, body: JSON.stringify(body), headers: { 'content-type': 'application/json' } };
    const response = await fetch(url, { cache: 'no-store', ...init }).catch(() => null);
    if (!response) return 'The server cannot be reached. Your words are still here; try again.';
    const answer = (await response.json().catch(() => null)) as { remarks?: Remark[]; canRemark?: boolean; error?: { message: string } } | null;
    if (!response.ok || !answer?.remarks) return answer?.error?.message ?? 'That did not work. Your words are still here; try again.';
    setAll(answer.remarks);
    setCanRemark(answer.canRemark ?? false);
    return null;
  }, []);

  const reload = useCallback(async () => {
    const trouble = await call(`${base}/remarks`, 'GET');
    setState((before) => (trouble === null ? 'ready' : before === 'ready' ? before : 'failed'));
  }, [base, call]);

  useEffect(() => {
    if (base === null) return;
    const first = setTimeout(() => void reload(), 0);
    const timer = setInterval(() => void (document.visibilityState === 'visible' && reload()), POLL_MS);
    return () => {
      clearTimeout(first);
      clearInterval(timer);
    };
  }, [base, reload]);

  return {
    state,
    all,
    canRemark,
    add: (remark) => call(`${base}/remarks`, 'POST', remark),
    change: (remarkId, change) => call(`${base}/remarks/${remarkId}`, 'PATCH', change),
    people: async () => {
      const response = await fetch(`${base}/people`).catch(() => null);
      return response?.ok ? ((await response.json()) as { people: string[] }).people : [];
    },
    takeBack: (remarkId) => call(`${base}/remarks/${remarkId}`, 'DELETE'),
    reload: () => void reload(),
  };
}

/** Threads of some remarks, the oldest first; answers whose beginning was taken back stand on their own. */
export function threadsOf(remarks: readonly Remark[]): { readonly head: Remark; readonly answers: readonly Remark[] }[] {
  const ids = new Set(remarks.map((r) => r.id));
  const heads = remarks.filter((r) => r.threadId === null || !ids.has(r.threadId));
  return heads.map((head) => ({ head, answers: remarks.filter((r) => r.threadId === head.id) }));
}
