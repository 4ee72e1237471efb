import type { Metadata } from 'next';
import { ButtonLink, EmptyState, Row, Section, Table, Td, Th } from '@/components/ui';
import { type AuditEvent, type AuditPlace, findSubjectNames, getAuditEvents } from '@/db/queries/audit';
import { canRunDepartment } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { createDeps } from '@/lib/workflows/deps';
import { formatAuditDetails, formatAuditVerb } from '../_components/audit-words';

export const metadata: Metadata = { title: 'Audit trail' };

const SHOWN = 50;

interface AuditPageProps {
  readonly searchParams: Promise<{ readonly after?: string }>;
}

export default async function AuditPage({ searchParams }: AuditPageProps) {
  const actor = await requireActor(canRunDepartment);
  const after = parsePlace((await searchParams).after);
  const { db } = createDeps();
  const events = await getAuditEvents(db, actor, after, SHOWN);
  if (events.length === 0) {
    return <EmptyState title="Nothing here">What members do with memberships, courses, scores and marks is noted here.</EmptyState>;
  }
  const last = events.at(-1);
  return (
    <Section title="Audit trail" aside="Newest first; times in UTC">
      <AuditTable events={events} names={await findSubjectNames(db, events)} />
      <div className="mt-4 flex gap-2">
        {after ? <ButtonLink href="/settings/audit">Newest</ButtonLink> : null}
        {last && events.length === SHOWN ? (
          <ButtonLink href={`/settings/audit?after=${formatPlace(last)}`}>Older</ButtonLink>
        ) : null}
      </div>
    </Section>
  );
}

interface AuditTableProps {
  readonly events: readonly AuditEvent[];
  /** What the subjects are called, by id. */
  readonly names: ReadonlyMap<string, string>;
}

function AuditTable({ events, names }: AuditTableProps) {
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
            <Td>{formatAuditVerb(event.verb, event.subjectKind)} <span className="text-ink-soft">{formatAuditDetails(event.details)}</span></Td>
            <Td>{names.get(event.subjectId) ?? <code className="text-small text-ink-soft">{event.subjectId.slice(0, 8)}</code>}</Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function formatMoment(moment: Date): string {
  return moment.toISOString().slice(0, 19).replace('T', ' ');
}

/** A place in the trail as a query parameter: milliseconds and the event's id. */
function formatPlace({ createdAt, id }: AuditPlace): string {
  return `${createdAt.getTime()}.${id}`;
}

function parsePlace(text: string | undefined): AuditPlace | null {
  const [, milliseconds, id] = /^(\d{1,15})\.([\w-]{1,36})$/.exec(text ?? '') ?? [];
  return milliseconds && id ? { createdAt: new Date(Number(milliseconds)), id } : null;
}
