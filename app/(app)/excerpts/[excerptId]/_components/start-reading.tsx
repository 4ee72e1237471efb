'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button, useAnnouncer } from '@/components/ui';
import { proposeAgainAction, startReadingAction } from '../actions';

interface StartReadingProps {
  readonly excerptId: string;
  /** The reading to start from; the proposal when it is left out. */
  readonly basedOn?: string;
  readonly kind?: 'primary' | 'plain';
  readonly small?: boolean;
  readonly children: string;
}

/** Begins a reading of one's own and goes to the desk with it. */
export function StartReading({ excerptId, basedOn, kind = 'plain', small = false, children }: StartReadingProps) {
  const router = useRouter();
  const { warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const start = async () => {
    setBusy(true);
    const answer = await startReadingAction({ excerptId, ...(basedOn ? { basedOn } : {}) }).catch(() => null);
    if (answer?.ok) return router.push(`/desk/${answer.value.readingId}`);
    setBusy(false);
    return warn(answer ? answer.error.message : 'The server cannot be reached. Try again.');
  };
  return <Button kind={kind} size={small ? 'small' : 'normal'} busy={busy} onClick={() => void start()}>{children}</Button>;
}

export function ProposeAgain({ excerptId }: { readonly excerptId: string }) {
  const { announce, warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const ask = async () => {
    setBusy(true);
    const answer = await proposeAgainAction({ excerptId }).catch(() => null);
    setBusy(false);
    if (answer?.ok) announce('The chords are being worked out again.');
    else warn(answer ? answer.error.message : 'The server cannot be reached. Try again.');
  };
  return <Button size="small" busy={busy} onClick={() => void ask()}>Propose again</Button>;
}
