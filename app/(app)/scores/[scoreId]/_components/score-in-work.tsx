'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { usePolling } from '@/components/library/use-polling';
import { Button, ErrorNote, Spinner, useAnnouncer } from '@/components/ui';
import { readScoreAgainAction } from '../actions';

/** Stands where the score will be while the server reads it, and draws the page anew when it is done. */
export function ScoreInWork({ scoreId }: { readonly scoreId: string }) {
  const router = useRouter();
  usePolling(true, async () => {
    const answer = await fetch(`/api/scores/states?ids=${scoreId}`);
    const [score] = (await answer.json()) as readonly { readonly state: string }[];
    const isDone = score !== undefined && score.state !== 'queued' && score.state !== 'reading';
    if (isDone) router.refresh();
    return isDone;
  });
  return (
    <p role="status" className="flex items-center gap-3 border-y border-rule py-10 text-ochre">
      <Spinner label="" />
      The score is being read. This page shows it as soon as it is there; you can leave meanwhile.
    </p>
  );
}

interface RefusedScoreProps {
  readonly scoreId: string;
  readonly fileName: string;
  readonly message: string;
  readonly place: string | null;
}

export function RefusedScore({ scoreId, fileName, message, place }: RefusedScoreProps) {
  const { warn } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const again = async () => {
    setBusy(true);
    const answer = await readScoreAgainAction({ scoreId }).catch(() => null);
    setBusy(false);
    if (!answer?.ok) warn(answer ? answer.error.message : 'The server cannot be reached. Try again.');
  };
  return (
    <ErrorNote title={`${fileName} could not be read${place ? `: ${place}` : ''}`} action={<Button size="small" busy={busy} onClick={() => void again()}>Read it again</Button>}>
      <p>{message}</p>
      <p className="mt-1">The file is kept as it was sent. Once it has been exported anew, upload the new file and delete this one.</p>
    </ErrorNote>
  );
}
