import Link from 'next/link';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { AuditEvent } from '@/lib/domain/audit/audit-event';
import { auditWords } from '@/lib/presentation/audit-words';
import { formatMoment } from '@/lib/presentation/moment';

const KINDS: Readonly<Record<AuditEvent['actorKind'], string>> = {
  user: 'person',
  token: 'API token',
  link: 'holder of a link',
  system: 'Selvedge itself',
};

function Actor({ event }: { event: AuditEvent }) {
  if (event.actorKind === 'system') return <>{KINDS.system}</>;
  const name = event.actorName ?? KINDS[event.actorKind];
  return (
    <>
      <Link href={`/site/audit?by=${event.actorId}`} className="text-link">
        {name}
      </Link>
      {event.actorKind === 'token' && <span className="block text-sm text-ink-soft">{KINDS.token}</span>}
    </>
  );
}

/** Who did what to which record: ids and names of fields, never what was in them. */
export function AuditTable({ events }: { events: readonly AuditEvent[] }) {
  return (
    <Table caption="Audit log, newest first">
      <thead>
        <tr>
          <Th>When</Th>
          <Th>Who</Th>
          <Th>Did</Th>
          <Th>Record</Th>
          <Th>Fields</Th>
        </tr>
      </thead>
      <tbody>
        {events.map((event) => (
          <Tr key={event.id}>
            <Td className="figures text-sm whitespace-nowrap">
              <time dateTime={event.at.toISOString()}>{formatMoment(event.at)}</time>
            </Td>
            <Td>
              <Actor event={event} />
            </Td>
            <Td>
              {auditWords(event.action)}
              <span className="figures block text-sm whitespace-nowrap text-ink-soft">{event.action}</span>
            </Td>
            <Td>
              {event.subjectType}
              <Link
                href={`/site/audit?subject=${event.subjectType}&id=${event.subjectId}`}
                className="figures block text-sm whitespace-nowrap text-link"
              >
                {event.subjectId.slice(0, 8)}
                <span className="sr-only">: all entries about this record</span>
              </Link>
            </Td>
            <Td className="figures text-sm">{event.fields.join(', ')}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
