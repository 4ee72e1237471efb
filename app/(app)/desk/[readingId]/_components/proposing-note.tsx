'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { ButtonLink, EmptyState, ErrorNote, Spinner } from '@/components/ui';

const LOOK_MS = 1_500;

/** While the engine is at work: the page looks by itself and opens the desk when it is ready. */
export function ProposingNote({ readingId, state, title }: { readonly readingId: string; readonly state: 'proposing' | 'failed'; readonly title: string }) {
  const router = useRouter();
  useEffect(() => {
    if (state !== 'proposing') return;
    const look = async () => {
      const response = await fetch(`/api/readings/${readingId}`, { cache: 'no-store' }).catch(() => null);
      const answer = response?.ok ? ((await response.json()) as { state: string }) : null;
      if (answer && answer.state !== 'proposing') router.refresh();
    };
    const timer = setInterval(() => void look(), LOOK_MS);
    return () => clearInterval(timer);
  }, [readingId, state, router]);

  return (
    <div className="sheet py-12">
      <h1 className="mb-6 text-title">{title}</h1>
      {state === 'failed' ? (
        <ErrorNote title="No labels could be proposed for this excerpt." action={<ButtonLink size="small" href="/library">Back to the library</ButtonLink>}>
          The score was read, but the proposal stopped. Start a new reading from the excerpt; if it stops again, cut a shorter excerpt.
        </ErrorNote>
      ) : (
        <EmptyState title="Labels are being proposed">
          <p role="status" className="flex items-center justify-center gap-2"><Spinner label="" /> A long excerpt takes up to a minute. The desk opens here by itself.</p>
        </EmptyState>
      )}
    </div>
  );
}
