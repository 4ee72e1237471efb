'use client';

import { useSyncExternalStore } from 'react';
import { Field, Input } from '@/components/ui';

interface DateFieldProps {
  readonly label: string;
  readonly hint: string;
  /** ISO 8601, UTC; null for none. */
  readonly value: string | null;
  readonly error: string | undefined;
  onChange(value: string | null): void;
}

const never = () => () => undefined;

/** A moment, typed in the reader's own time zone and kept in UTC. */
export function DateField({ label, hint, value, error, onChange }: DateFieldProps) {
  // The server does not know the zone: the field is filled once the browser has it.
  const here = useSyncExternalStore(never, () => true, () => false);
  return (
    <Field label={label} hint={hint} error={error}>
      <Input
        type="datetime-local"
        value={here && value ? localText(value) : ''}
        onChange={(event) => onChange(event.target.value === '' ? null : new Date(event.target.value).toISOString())}
      />
    </Field>
  );
}

/** `2026-12-01T17:00`, local. */
function localText(iso: string): string {
  const date = new Date(iso);
  const local = new Date(date.getTime() - date.getTimezoneOffset() * 60_000);
  return local.toISOString().slice(0, 16);
}
