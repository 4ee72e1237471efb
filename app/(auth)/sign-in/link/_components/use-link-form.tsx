'use client';

import { loadPage } from '@/app/_components/load-page';
import { useSubmit } from '@/app/_components/use-submit';
import { Button, ErrorNote } from '@/components/ui';
import { enter } from '../../_components/enter';

export function UseLinkForm({ token }: { readonly token: string }) {
  const { outcome, busy, failure, form } = useSubmit(
    () => enter('link', { token }),
    () => loadPage('/'),
  );
  return (
    <form {...form} className="flex flex-col gap-4">
      {failure ? <ErrorNote>{failure}</ErrorNote> : <p className="text-ink-soft">One press, and you are in.</p>}
      <Button type="submit" kind="primary" busy={busy || outcome?.ok === true} busyText="Signing in …">Sign in</Button>
    </form>
  );
}
