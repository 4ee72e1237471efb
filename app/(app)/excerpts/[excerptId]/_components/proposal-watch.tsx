'use client';

import { useRouter } from 'next/navigation';
import { usePolling } from '@/components/library/use-polling';
import { Spinner, useAnnouncer } from '@/components/ui';

/** While the proposal is being worked out: says so, and draws the page anew when it is there. */
export function ProposalWatch({ excerptId }: { readonly excerptId: string }) {
  const router = useRouter();
  const { announce, warn } = useAnnouncer();
  usePolling(true, async () => {
    const answer = await fetch(`/api/excerpts/${excerptId}/readings`);
    if (!answer.ok) return false;
    const readings = (await answer.json()) as readonly { readonly kind: string; readonly state: string }[];
    const proposals = readings.filter(({ kind }) => kind === 'engine');
    if (proposals.some(({ state }) => state === 'proposing')) return false;
    if (proposals.some(({ state }) => state === 'open')) announce('The proposal is there.');
    else warn('No proposal could be worked out for this excerpt.');
    router.refresh();
    return true;
  });
  return (
    <p role="status" className="mb-4 flex items-center gap-3 border-y border-rule py-3 text-ochre">
      <Spinner label="" />
      The chords are being worked out. A page of music takes a few seconds.
    </p>
  );
}
