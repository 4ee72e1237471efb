'use client';

import { type FormEvent, useState } from 'react';
import { ERRORS } from '@/lib/errors';
import type { FormAction } from '@/lib/http/action';
import type { Outcome } from '@/lib/http/run';

/** What was sent. */
export interface Sent {
  readonly data: FormData;
  /** Empties the form. */
  reset(): void;
}

export interface Submit<T> {
  /** Null until an answer came. */
  readonly outcome: Outcome<T> | null;
  readonly busy: boolean;
  /** Field → what is wrong with it. */
  readonly fields: Readonly<Record<string, string>>;
  /** What is wrong apart from the fields. */
  readonly failure: string | null;
  /** For the form: `<form {...form}>`. */
  readonly form: {
    readonly onSubmit: (event: FormEvent<HTMLFormElement>) => void;
    readonly action: (data: FormData) => void;
  };
  readonly onSubmit: (event: FormEvent<HTMLFormElement>) => void;
}

const UNREACHED = { ok: false, error: { code: 'unavailable', message: ERRORS.unavailable.message } } as const;

/**
 * Sends a form to a form action and keeps what was typed when it is refused (a form's own `action` empties it). A lost
 * connection is an answer like any other. `onDone` runs once the action went well.
 *
 * `action` is there for a form that is sent before the page's script is at work: React holds it back and hands it to
 * `action` then, where without it the browser would load the page anew with the fields in its address.
 */
export function useSubmit<T>(action: FormAction<T>, onDone?: (value: T, sent: Sent) => Promise<void> | void): Submit<T> {
  const [outcome, setOutcome] = useState<Outcome<T> | null>(null);
  const [busy, setBusy] = useState(false);
  const send = async (sent: Sent) => {
    setBusy(true);
    const answer = await action(null, sent.data).catch(() => UNREACHED);
    setOutcome(answer);
    if (answer.ok) await onDone?.(answer.value, sent);
    setBusy(false);
  };
  const onSubmit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    if (!busy) void send({ data: new FormData(form), reset: () => form.reset() });
  };
  const error = outcome && !outcome.ok ? outcome.error : null;
  return {
    outcome,
    busy,
    fields: error?.fields ?? {},
    failure: error && !error.fields ? error.message : null,
    form: { onSubmit, action: (data) => void send({ data, reset: () => undefined }) },
    onSubmit,
  };
}
