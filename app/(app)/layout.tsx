import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { getDepartment } from '@/db/queries/members';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { Shell } from './_components/shell';

/** Every page in here is for someone who is signed in; each page asks again itself, with its own permission. */
export default async function SignedInLayout({ children }: { readonly children: ReactNode }) {
  const actor = await requireActor();
  const department = await getDepartment(createDeps().db, actor);
  const chosen = (await cookies()).get('theme')?.value;
  const theme = chosen === 'day' || chosen === 'night' ? chosen : 'system';
  return (
    <Shell departmentName={department.name} person={{ name: actor.name, role: actor.role }} theme={theme}>
      {children}
    </Shell>
  );
}
