'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Button, useAnnouncer } from '@/components/ui';
import { start } from '../../../submissions/actions';

export function BeginButton({ assignmentId, again }: { readonly assignmentId: string; readonly again: boolean }) {
  const router = useRouter();
  const { warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const [leaving, leave] = useTransition();
  const begin = async () => {
    setBusy(true);
    const outcome = await start({ assignmentId }).catch(() => null);
    setBusy(false);
    if (outcome?.ok) leave(() => router.push(`/submissions/${outcome.value.submissionId}`));
    else warn(outcome?.error.message ?? 'The server did not answer. Nothing was lost; try again.');
  };
  return (
    <Button kind="primary" busy={busy || leaving} busyText="Opening your desk …" onClick={() => void begin()}>
      {again ? 'Begin another attempt' : 'Begin'}
    </Button>
  );
}
