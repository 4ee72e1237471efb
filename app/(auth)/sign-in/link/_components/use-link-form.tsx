'use client';

import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { Button, ErrorNote } from '@/components/ui';
import { signInErrorMessage } from '@/lib/http/sign-in-error';

export function UseLinkForm({ token }: { readonly token: string }) {
  const [error, setError] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const use = async () => {
    setBusy(true);
    const failed = await signInByLink(token);
    if (failed === null) return window.location.assign('/');
    setError(signInErrorMessage(failed));
    setBusy(false);
  };
  return (
    <div className="flex flex-col gap-4">
      {error ? <ErrorNote>{error}</ErrorNote> : <p className="text-ink-soft">One press, and you are in.</p>}
      <Button kind="primary" busy={busy} busyText="Signing in …" onClick={() => void use()}>Sign in</Button>
    </div>
  );
}

/** The code of what went wrong, or null. */
async function signInByLink(token: string): Promise<string | null> {
  try {
    const answer = await signIn('link', { token, redirect: false });
    return answer?.ok ? null : (answer?.error ?? 'internal');
  } catch {
    return 'unavailable';
  }
}
