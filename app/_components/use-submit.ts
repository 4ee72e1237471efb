'use client';

import { type FormEvent, useState } from 'react';
import { ERRORS } from '@/lib/errors';
import type { FormAction } from '@/lib/http/action';
import type { Outcome } from '@/lib/http/run';

export interface Submit<T> {
  /** Null until an answer came. */
  readonly outcome: Outcome<T> | null;
  readonly busy: boolean;
  /** Field → what is wrong with it. */
  readonly fields: Readonly<Record<string, string>>;
  /** What is wrong apart from the fields. */
  readonly failure: string | null;
  readonly onSubmit: (event: FormEvent<HTMLFormElement>) => void;
}

const UNREACHED = { ok: false, error: { code: 'unavailable', message: ERRORS.unavailable.message } } as const;

/**
 * Sends a form to a form action and keeps what was typed when it is refused (a form's own `action` empties it). A lost
 * connection is an answer like any other. `onDone` runs once the action went well.
 */
export function useSubmit<T>(action: FormAction<T>, onDone?: (value: T, form: HTMLFormElement) => Promise<void> | void): Submit<T> {
  const [outcome, setOutcome] = useState<Outcome<T> | null>(null);
  const [busy, setBusy] = useState(false);
  const send = async (form: HTMLFormElement) => {
    setBusy(true);
    const answer = await action(null, new FormData(form)).catch(() => UNREACHED);
    setOutcome(answer);
    if (answer.ok) await onDone?.(answer.value, form);
    setBusy(false);
  };
  const onSubmit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (!busy) void send(event.currentTarget);
  };
  const error = outcome && !outcome.ok ? outcome.error : null;
  return { outcome, busy, fields: error?.fields ?? {}, failure: error && !error.fields ? error.message : null, onSubmit };
}
