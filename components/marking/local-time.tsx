'use client';

import { useSyncExternalStore } from 'react';

interface LocalTimeProps {
  /** ISO 8601, UTC. */
  readonly at: string;
  readonly time?: boolean;
}

const never = () => () => undefined;

/** A moment in the reader's own time zone; until the browser has taken over, in UTC and saying so. */
export function LocalTime({ at, time = true }: LocalTimeProps) {
  const here = useSyncExternalStore(never, () => true, () => false);
  const format = new Intl.DateTimeFormat('en-GB', {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    ...(time ? { hour: '2-digit', minute: '2-digit' } : {}),
    ...(here ? {} : { timeZone: 'UTC' }),
  });
  return (
    <time dateTime={at} className="tabular whitespace-nowrap">
      {format.format(new Date(at))}
      {here || !time ? null : ' UTC'}
    </time>
  );
}
