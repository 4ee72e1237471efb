'use client';

import { type Dispatch, useCallback, useEffect, useRef, useState } from 'react';
import type { DeskAction, DeskState } from './desk-state';
import { type EditStore, openEditStore } from './edit-store';
import { fetchReading, fetchRevisions, postEdit } from './reading-client';

export type SaveState = 'saved' | 'saving' | 'kept-here' | 'signed-out' | 'overtaken' | 'refused';

/** First wait after a failed try, doubled each time up to the longest. */
const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 15_000;
/** How often an open desk asks what others saved: they are seen within three seconds. */
const POLL_MS = 2_500;

export interface Saving {
  readonly state: SaveState;
  readonly message: string | null;
  retry(): void;
}

/**
 * Sends the first pending edit, one at a time and in order, for as long as there is one; keeps the rest in the browser's
 * storage meanwhile. `base` is null on a desk that saves nothing.
 */
export function useSaving(base: string | null, userId: string, desk: DeskState, dispatch: Dispatch<DeskAction>): Saving {
  const [trouble, setTrouble] = useState<{ state: SaveState; message: string | null } | null>(null);
  const [turn, setTurn] = useState(0);
  const failures = useRef(0);
  useStoredEdits(base, userId, desk, dispatch);
  usePolling(base, desk, dispatch);

  const nextId = desk.conflict ? null : (desk.pending[0]?.editId ?? null);
  const blocked = trouble?.state === 'refused' || trouble?.state === 'signed-out';
  const latest = useRef(desk);
  useEffect(() => {
    latest.current = desk;
  });

  const retry = useCallback(() => {
    failures.current = 0;
    setTrouble(null);
    setTurn((n) => n + 1);
  }, []);

  // One effect per edit and per try; the desk's other changes do not start a second sending.
  useEffect(() => {
    if (!base || nextId === null || blocked) return;
    let cancelled = false;
    const send = async () => {
      const edit = latest.current.pending.find((p) => p.editId === nextId);
      const answer = edit && (await postEdit(base, latest.current.version, edit));
      if (!edit || !answer || (cancelled && answer.kind !== 'saved')) return;
      if (answer.kind === 'saved') {
        failures.current = 0;
        setTrouble(null);
        dispatch({ kind: 'received', version: answer.version, revisions: answer.revisions, confirmed: nextId });
      } else if (answer.kind === 'overtaken') {
        const now = await fetchReading(base);
        if (now) dispatch({ kind: 'conflicted', conflict: { edit, version: now.version, theirs: now.reading } });
      } else if (answer.kind === 'unreachable') {
        failures.current += 1;
        setTrouble({ state: 'kept-here', message: null });
        setTurn((n) => n + 1);
      } else {
        setTrouble({ state: answer.kind, message: answer.kind === 'refused' ? answer.message : null });
      }
    };
    const timer = setTimeout(() => void send(), waitAfter(failures.current));
    return () => {
      cancelled = true;
      clearTimeout(timer);
    };
  }, [base, nextId, turn, blocked, dispatch]);

  useEffect(() => {
    window.addEventListener('online', retry);
    return () => window.removeEventListener('online', retry);
  }, [retry]);

  return { state: stateOf(desk, trouble?.state ?? null), message: trouble?.message ?? null, retry };
}

function waitAfter(failures: number): number {
  return failures === 0 ? 0 : Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** (failures - 1));
}

function stateOf(desk: DeskState, trouble: SaveState | null): SaveState {
  if (desk.conflict) return 'overtaken';
  if (desk.pending.length === 0) return 'saved';
  return trouble ?? 'saving';
}

function useStoredEdits(base: string | null, userId: string, desk: DeskState, dispatch: Dispatch<DeskAction>): void {
  const store = useRef<EditStore | null>(null);
  useEffect(() => {
    if (!base) return;
    const opened = openEditStore(localStorage, userId, base.split('/').at(-1) ?? base, crypto.randomUUID());
    store.current = opened;
    void opened.adopt(Date.now()).then((edits) => edits.length > 0 && dispatch({ kind: 'adopt', edits }));
    return () => opened.close();
  }, [base, userId, dispatch]);
  useEffect(() => store.current?.keep(desk.pending), [desk.pending]);
}

/** Asks for others' edits while the page is looked at and nothing of ours is under way. */
function usePolling(base: string | null, desk: DeskState, dispatch: Dispatch<DeskAction>): void {
  const quiet = desk.pending.length === 0 && !desk.conflict;
  const { version } = desk;
  useEffect(() => {
    if (!base || !quiet) return;
    const look = async () => {
      if (document.visibilityState !== 'visible') return;
      const received = await fetchRevisions(base, version);
      if (received && received.version > version) dispatch({ kind: 'received', ...received });
    };
    const timer = setInterval(() => void look(), POLL_MS);
    return () => clearInterval(timer);
  }, [base, quiet, version, dispatch]);
}
