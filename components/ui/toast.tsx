'use client';

import { type ReactNode, createContext, useCallback, useContext, useEffect, useMemo, useRef, useState } from 'react';
import { classNames } from './class-names';
import { ShapeIcon } from './shape';
import { allowOwnStyles } from './style-nonce';

interface Toast {
  readonly id: number;
  readonly text: string;
  readonly tone: 'settled' | 'eye';
  readonly action: { readonly label: string; readonly run: () => void } | null;
}

interface Announcer {
  /** Says it on screen and to screen readers; goes away by itself after eight seconds, longer when it has an action. */
  readonly announce: (text: string, action?: { label: string; run: () => void }) => void;
  /** The same for a failure: it stays until it is dismissed. */
  readonly warn: (text: string) => void;
}

const SHOWN_MS = 8_000;
const SHOWN_WITH_ACTION_MS = 20_000;

const AnnouncerContext = createContext<Announcer | null>(null);

export function useAnnouncer(): Announcer {
  const announcer = useContext(AnnouncerContext);
  if (!announcer) throw new Error('useAnnouncer outside Announcements');
  return announcer;
}

/** Holds the messages of everything inside it. Once, in the root layout. */
export function Announcements({ children }: { readonly children: ReactNode }) {
  const [toasts, setToasts] = useState<readonly Toast[]>([]);
  const lastId = useRef(0);
  useEffect(allowOwnStyles, []);
  const dismiss = useCallback((id: number) => setToasts((all) => all.filter((toast) => toast.id !== id)), []);
  const add = useCallback(
    (text: string, tone: Toast['tone'], action: Toast['action']) => {
      const id = (lastId.current += 1);
      setToasts((all) => [...all.slice(-3), { id, text, tone, action }]);
      if (tone === 'settled') setTimeout(() => dismiss(id), action ? SHOWN_WITH_ACTION_MS : SHOWN_MS);
    },
    [dismiss],
  );
  const announcer = useMemo<Announcer>(
    () => ({ announce: (text, action) => add(text, 'settled', action ?? null), warn: (text) => add(text, 'eye', null) }),
    [add],
  );
  return (
    <AnnouncerContext value={announcer}>
      {children}
      <ol aria-live="polite" aria-label="Messages" className="pointer-events-none fixed inset-x-4 bottom-4 z-60 flex flex-col items-center gap-2 print:hidden">
        {toasts.map((toast) => <ToastRow key={toast.id} toast={toast} dismiss={() => dismiss(toast.id)} />)}
      </ol>
    </AnnouncerContext>
  );
}

function ToastRow({ toast, dismiss }: { readonly toast: Toast; readonly dismiss: () => void }) {
  const { text, tone, action } = toast;
  return (
    <li className="pointer-events-auto flex max-w-xl items-baseline gap-3 border border-ink bg-sheet px-4 py-2">
      <ShapeIcon shape={tone === 'eye' ? 'triangle' : 'check'} className={classNames(tone === 'eye' ? 'text-madder' : 'text-verdigris')} />
      <span>{text}</span>
      {action ? (
        <button type="button" className="link min-h-6" onClick={() => { action.run(); dismiss(); }}>{action.label}</button>
      ) : null}
      <button type="button" className="caps min-h-6 text-small text-ink-soft hover:text-ink" onClick={dismiss}>Dismiss</button>
    </li>
  );
}
