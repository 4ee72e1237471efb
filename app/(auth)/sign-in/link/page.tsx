import type { Metadata } from 'next';
import Link from 'next/link';
import { AskForLinkForm } from './_components/ask-for-link-form';
import { UseLinkForm } from './_components/use-link-form';

export const metadata: Metadata = { title: 'Sign in by mail' };

/** Asks for a link; with `?token=` it is where the link leads. A button uses it up, so that a mail scanner's visit does not. */
export default async function SignInLinkPage({ searchParams }: { readonly searchParams: Promise<{ readonly token?: string }> }) {
  const { token } = await searchParams;
  return (
    <>
      <h1 className="mb-3 text-title">{token ? 'Your link to sign in' : 'Sign in by mail'}</h1>
      {token ? <UseLinkForm token={token} /> : <AskForLinkForm />}
      <p className="mt-6 border-t border-rule pt-4 text-small text-ink-soft">
        <Link href="/sign-in" className="link">Sign in with a password</Link>
      </p>
    </>
  );
}
