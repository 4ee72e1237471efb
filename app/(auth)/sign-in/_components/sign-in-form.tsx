'use client';

import Link from 'next/link';
import { signIn } from 'next-auth/react';
import { loadPage } from '@/app/_components/load-page';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote, Field, Input } from '@/components/ui';
import { signInErrorMessage } from '@/lib/http/sign-in-error';
import { enter } from './enter';

interface SignInFormProps {
  /** Path to go to afterwards. */
  readonly next: string;
  /** Name of the department's OpenID provider, when there is one. */
  readonly providerName: string | null;
  /** What went wrong before this page came. */
  readonly startError: string | null;
}

export function SignInForm({ next, providerName, startError }: SignInFormProps) {
  const { outcome, busy, failure, form } = useSubmit(
    (_previous, data) => enter('password', { email: String(data.get('email')), password: String(data.get('password')) }),
    () => loadPage(next),
  );
  const error = outcome ? failure : startError && signInErrorMessage(startError);
  return (
    <>
      {error ? <ErrorNote className="mb-5">{error}</ErrorNote> : null}
      <form {...form} className="flex flex-col gap-4">
        <Field label="E-mail">
          <Input name="email" type="email" autoComplete="username" required autoFocus />
        </Field>
        <Field label="Password">
          <Input name="password" type="password" autoComplete="current-password" required />
        </Field>
        <Button type="submit" kind="primary" busy={busy || outcome?.ok === true} busyText="Signing in …" className="mt-1">
          Sign in
        </Button>
      </form>
      {providerName ? (
        <Button className="mt-3 w-full" onClick={() => void signIn('provider', { callbackUrl: next })}>{providerName}</Button>
      ) : null}
      <p className="mt-6 border-t border-rule pt-4 text-small text-ink-soft">
        Forgotten the password, or none yet? <Link href="/sign-in/link" className="link">Get a link by mail</Link>
      </p>
    </>
  );
}
