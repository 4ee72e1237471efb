import type { Metadata } from 'next';
import { ButtonLink, EmptyState, Row, Section, Table, Td, Th } from '@/components/ui';
import { type AuditEvent, getAuditEvents } from '@/db/queries/audit';
import { canRunDepartment } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { formatAuditDetails, formatAuditVerb } from '../_components/audit-words';

export const metadata: Metadata = { title: 'Audit trail' };

const SHOWN = 50;

interface AuditPageProps {
  readonly searchParams: Promise<{ readonly before?: string }>;
}

export default async function AuditPage({ searchParams }: AuditPageProps) {
  const actor = await requireActor(canRunDepartment);
  const before = parseInstant((await searchParams).before);
  const events = await getAuditEvents(createDeps().db, actor, before, SHOWN);
  if (events.length === 0) {
    return <EmptyState title="Nothing here">What members do with memberships, courses, scores and marks is noted here.</EmptyState>;
  }
  const last = events.at(-1);
  return (
    <Section title="Audit trail" aside="Newest first; times in UTC">
      <AuditTable events={events} />
      <div className="mt-4 flex gap-2">
        {before ? <ButtonLink href="/settings/audit">Newest</ButtonLink> : null}
        {last && events.length === SHOWN ? (
          <ButtonLink href={`/settings/audit?before=${encodeURIComponent(last.createdAt.toISOString())}`}>Older</ButtonLink>
        ) : null}
      </div>
    </Section>
  );
}

function AuditTable({ events }: { readonly events: readonly AuditEvent[] }) {
  return (
    <Table caption="Audit trail">
      <thead>
        <Row>
          <Th>When</Th>
          <Th>Who</Th>
          <Th>What</Th>
          <Th>On</Th>
        </Row>
      </thead>
      <tbody>
        {events.map((event) => (
          <Row key={event.id}>
            <Td className="tabular whitespace-nowrap">{formatMoment(event.createdAt)}</Td>
            <Td>{event.actorName ?? 'the system'}</Td>
            <Td>{formatAuditVerb(event.verb)} <span className="text-ink-soft">{formatAuditDetails(event.details)}</span></Td>
            <Td className="text-small text-ink-soft">
              {event.subjectKind} <code className="break-all">{event.subjectId.slice(0, 8)}</code>
            </Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function formatMoment(moment: Date): string {
  return moment.toISOString().slice(0, 19).replace('T', ' ');
}

function parseInstant(text: string | undefined): Date | null {
  const moment = new Date(text ?? '');
  return Number.isNaN(moment.getTime()) ? null : moment;
}
