'use client';

import { type Dispatch, useCallback, useEffect, useState } from 'react';
import { edited } from '@/lib/harmony/edit';
import { rewind } from '@/lib/harmony/edit-merge';
import type { Label } from '@/lib/harmony/reading';
import type { DeskAction, DeskState } from './desk-state';
import { fetchRevisions } from './reading-client';

/** A saved edit as the list shows it. */
export interface PastEdit {
  readonly version: number;
  readonly by: string | null;
  readonly at: string;
  readonly words: string;
  readonly changed: readonly { readonly before: Label | null; readonly after: Label | null }[];
  readonly count: number;
}

export interface History {
  readonly state: 'loading' | 'ready' | 'failed';
  readonly edits: readonly PastEdit[];
  readonly more: boolean;
  /** Fetches the next page of older ones; or the first anew. */
  older(): void;
  reload(): void;
  /** Brings back the reading as it was after version `version`, as an edit of its own that can be undone. */
  restore(version: number, words: string): Promise<void>;
}

/** The list of a reading's saved edits, fetched while it is looked at and again whenever the reading moves on. */
export function useHistory(base: string, desk: DeskState, dispatch: Dispatch<DeskAction>): History {
  const [state, setState] = useState<History['state']>('loading');
  const [edits, setEdits] = useState<readonly PastEdit[]>([]);
  const [more, setMore] = useState(false);

  const load = useCallback(
    async (before: number | null) => {
      const response = await fetch(`${base}/revisions${before === null ? '' : `?before=${before}`}`, { cache: 'no-store' }).catch(() => null);
      if (!response?.ok) return setState('failed');
      const answer = (await response.json()) as { revisions: PastEdit[]; more: boolean };
      setEdits((known) => (before === null ? answer.revisions : [...known, ...answer.revisions]));
      setMore(answer.more);
      setState('ready');
    },
    [base],
  );

  useEffect(() => {
    const timer = setTimeout(() => void load(null), 0);
    return () => clearTimeout(timer);
  }, [load, desk.version]);

  const restore = async (version: number, words: string) => {
    const say = (text: string) => dispatch({ kind: 'say', text });
    if (desk.pending.length > 0) return say('Your last edits are not saved yet. Try again when they are.');
    const since = await fetchRevisions(base, version);
    if (!since) return say('The server cannot be reached. Nothing was changed.');
    const then = since.version === desk.version ? rewind(desk.server, since.revisions.map((r) => r.change)) : null;
    if (!then) return say('The reading has moved on meanwhile. Look at the list again.');
    dispatch({ kind: 'edit', editId: crypto.randomUUID(), result: edited(desk.reading, then), words });
  };

  return { state, edits, more, older: () => void load(edits.at(-1)?.version ?? null), reload: () => void load(null), restore };
}
