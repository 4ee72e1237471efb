import type { ReactNode } from 'react';
import { PageHeader } from '@/components/ui';
import { getDepartment } from '@/db/queries/members';
import { canRunDepartment } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { SettingsNavigation } from './_components/settings-navigation';

export default async function SettingsLayout({ children }: { readonly children: ReactNode }) {
  const actor = await requireActor(canRunDepartment);
  const department = await getDepartment(createDeps().db, actor);
  return (
    <div className="sheet pb-16">
      <PageHeader title="Settings" subtitle={department.name} />
      <SettingsNavigation />
      {children}
    </div>
  );
}
