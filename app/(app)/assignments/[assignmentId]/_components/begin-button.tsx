'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button, useAnnouncer } from '@/components/ui';
import { start } from '../../../submissions/actions';

export function BeginButton({ assignmentId, again }: { readonly assignmentId: string; readonly again: boolean }) {
  const router = useRouter();
  const { warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const begin = async () => {
    setBusy(true);
    const outcome = await start({ assignmentId }).catch(() => null);
    if (outcome?.ok) return router.push(`/submissions/${outcome.value.submissionId}`);
    setBusy(false);
    warn(outcome?.error.message ?? 'The server did not answer. Nothing was lost; try again.');
  };
  return (
    <Button kind="primary" busy={busy} busyText="Opening your desk …" onClick={() => void begin()}>
      {again ? 'Begin another attempt' : 'Begin'}
    </Button>
  );
}
