import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { getProviderName } from '@/lib/http/provider-name';
import { safePath } from '@/lib/http/safe-path';
import { getActor } from '@/lib/http/visitor';
import { SignInForm } from './_components/sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

interface SignInPageProps {
  readonly searchParams: Promise<{ readonly from?: string; readonly callbackUrl?: string; readonly error?: string }>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const { from, error } = await searchParams;
  const next = safePath(from);
  if (await getActor()) redirect(next);
  return (
    <>
      <h1 className="mb-5 text-title">Sign in</h1>
      <SignInForm next={next} providerName={getProviderName()} startError={error ?? null} />
    </>
  );
}
