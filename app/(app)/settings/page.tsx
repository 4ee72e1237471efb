import type { Metadata } from 'next';
import { ButtonLink, Section } from '@/components/ui';
import { getDepartment } from '@/db/queries/members';
import { canRunDepartment } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { PAPERS } from '@/lib/vocabularies';
import { createDeps } from '@/lib/workflows/deps';
import { DepartmentForm } from './_components/department-form';

export const metadata: Metadata = { title: 'Settings' };

export default async function SettingsPage() {
  const actor = await requireActor(canRunDepartment);
  const { name, settings } = await getDepartment(createDeps().db, actor);
  return (
    <>
      <Section title="Department">
        <DepartmentForm name={name} paper={settings.paper ?? PAPERS[0]} />
      </Section>
      <Section title="The department’s data">
        <p className="measure mb-3 text-ink-soft">
          One archive with everything: members, scores with their files, excerpts, readings with every label and edit,
          remarks, courses, assignments, submissions, marks, and the audit trail. It holds personal data; keep it accordingly.
        </p>
        <ButtonLink href="/settings/export" prefetch={false} download>Download the archive</ButtonLink>
      </Section>
    </>
  );
}
