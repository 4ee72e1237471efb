import type { ReactNode } from 'react';
import { Wordmark } from '@/components/ui';

/** The pages before one is signed in: a title page, one column, one thing to do. */
export default function SignedOutLayout({ children }: { readonly children: ReactNode }) {
  return (
    <main className="mx-auto flex min-h-dvh w-full max-w-md flex-col justify-center px-5 py-10">
      <div className="mb-8 flex justify-center">
        <Wordmark />
      </div>
      <div className="plate bg-sheet px-6 py-7 sm:px-9">{children}</div>
    </main>
  );
}
