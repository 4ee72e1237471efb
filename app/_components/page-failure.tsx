'use client';

import Link from 'next/link';
import { Button, buttonClass } from '@/components/ui';

export interface PageFailureProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

/** A page that failed: what was saved is safe; the digest ties this screen to the server's log. */
export function PageFailure({ error, reset }: PageFailureProps) {
  return (
    <div className="sheet flex min-h-[70dvh] flex-col items-start justify-center gap-4 py-16">
      <p className="caps text-madder">A wrong note of ours</p>
      <h1 className="text-display">Something went wrong on our side</h1>
      <p className="measure text-ink-soft">
        It was logged. Nothing that was saved is lost. Try once more; if it happens again, tell the owner of your
        department{error.digest ? <> and give the number <span className="tabular text-ink">{error.digest}</span></> : null}.
      </p>
      <div className="flex gap-2">
        <Button kind="primary" onClick={reset}>Try again</Button>
        <Link href="/" className={buttonClass()}>To the start</Link>
      </div>
    </div>
  );
}
