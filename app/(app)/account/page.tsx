import type { Metadata } from 'next';
import { ButtonLink, Facts, PageHeader, Section } from '@/components/ui';
import { getMemberships, getOwnAccount } from '@/db/queries/users';
import { getVisitor, requireActor } from '@/lib/http/visitor';
import { hasFreshLink } from '@/lib/workflows/change-password';
import { createDeps } from '@/lib/workflows/deps';
import { DepartmentChoice } from './_components/department-choice';
import { EraseAccount } from './_components/erase-account';
import { NameForm } from './_components/name-form';
import { PasswordForm } from './_components/password-form';
import { RemarkMail } from './_components/remark-mail';
import { SignOutEverywhere } from './_components/sign-out-everywhere';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const actor = await requireActor();
  const deps = createDeps();
  const account = await getOwnAccount(deps.db, actor);
  const memberships = await getMemberships(deps.db, actor.userId);
  const fresh = hasFreshLink(await getVisitor(), deps.now());
  return (
    <div className="sheet max-w-3xl pb-16">
      <PageHeader title="Account" subtitle={account.email} />
      <Section title="You">
        <NameForm name={account.name} />
        <div className="mt-4">
          <Facts facts={[{ term: 'Role', value: actor.role }, { term: 'Here since', value: formatDay(account.createdAt) }]} />
        </div>
        {memberships.length > 1 ? <DepartmentChoice memberships={memberships} chosen={actor.departmentId} /> : null}
      </Section>
      <Section title={account.hasPassword ? 'Change the password' : 'Choose a password'}>
        <PasswordForm email={account.email} hasPassword={account.hasPassword} fresh={fresh} />
      </Section>
      <Section title="Mail">
        <RemarkMail wanted={account.preferences.remarkMail ?? true} />
      </Section>
      <Section title="Devices">
        <SignOutEverywhere />
      </Section>
      <Section title="Your data">
        <p className="measure mb-3 text-ink-soft">
          Everything that is kept about you, as one file: your account, your courses, your readings with every label, your
          remarks, what you handed in and the marks you were given.
        </p>
        <ButtonLink href="/account/export" prefetch={false} download>Download my data</ButtonLink>
      </Section>
      <Section title="Delete the account">
        <EraseAccount hasPassword={account.hasPassword} fresh={fresh} />
      </Section>
    </div>
  );
}

function formatDay(day: Date): string {
  return new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: 'UTC' }).format(day);
}
