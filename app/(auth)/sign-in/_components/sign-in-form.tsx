'use client';

import Link from 'next/link';
import { signIn } from 'next-auth/react';
import { type FormEvent, useState } from 'react';
import { Button, ErrorNote, Field, Input } from '@/components/ui';
import { signInErrorMessage } from '@/lib/http/sign-in-error';

interface SignInFormProps {
  /** Path to go to afterwards. */
  readonly next: string;
  /** Name of the department's OpenID provider, when there is one. */
  readonly providerName: string | null;
  readonly startError: string | null;
}

export function SignInForm({ next, providerName, startError }: SignInFormProps) {
  const [error, setError] = useState(startError);
  const [busy, setBusy] = useState(false);
  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    setError(null);
    const failed = await signInByPassword(String(form.get('email')), String(form.get('password')));
    if (failed === null) return window.location.assign(next);
    setError(signInErrorMessage(failed));
    setBusy(false);
  };
  return (
    <>
      {error ? <ErrorNote className="mb-5">{error}</ErrorNote> : null}
      <form method="post" onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
        <Field label="E-mail">
          <Input name="email" type="email" autoComplete="username" required autoFocus />
        </Field>
        <Field label="Password">
          <Input name="password" type="password" autoComplete="current-password" required />
        </Field>
        <Button type="submit" kind="primary" busy={busy} busyText="Signing in …" className="mt-1">Sign in</Button>
      </form>
      {providerName ? <ProviderButton name={providerName} next={next} /> : null}
      <p className="mt-6 border-t border-rule pt-4 text-small text-ink-soft">
        Forgotten the password, or none yet? <Link href="/sign-in/link" className="link">Get a link by mail</Link>
      </p>
    </>
  );
}

/** The code of what went wrong, or null. */
async function signInByPassword(email: string, password: string): Promise<string | null> {
  try {
    const answer = await signIn('password', { email, password, redirect: false });
    return answer?.ok ? null : (answer?.error ?? 'internal');
  } catch {
    return 'unavailable';
  }
}

function ProviderButton({ name, next }: { readonly name: string; readonly next: string }) {
  return (
    <Button className="mt-3 w-full" onClick={() => void signIn('provider', { callbackUrl: next })}>
      {name}
    </Button>
  );
}
