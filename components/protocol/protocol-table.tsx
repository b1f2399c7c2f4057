import Link from 'next/link';
import { Badge } from '@/components/ui/badge';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/page';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { REGION_WORDS } from '@/lib/presentation/anatomy-words';
import { formatMoment } from '@/lib/presentation/moment';
import type { ProtocolListItem } from '@/lib/schemas/protocol';

export function ProtocolTable({
  protocols,
  mayEdit,
}: {
  protocols: readonly ProtocolListItem[];
  mayEdit: boolean;
}) {
  if (protocols.length === 0) {
    return (
      <EmptyState
        title="No protocol yet"
        action={
          mayEdit && (
            <LinkButton href="/site/protocols/new" variant="primary">
              Add the first protocol
            </LinkButton>
          )
        }
      >
        {mayEdit
          ? 'One sequence is enough to get a verdict on the bench; more can follow.'
          : 'A lead of your site adds them here.'}
      </EmptyState>
    );
  }
  return (
    <Table caption="Protocols of this site">
      <thead>
        <tr>
          <Th>Protocol</Th>
          <Th>Body part</Th>
          <Th>Sequences</Th>
          <Th>Version</Th>
          <Th>Changed</Th>
        </tr>
      </thead>
      <tbody>
        {protocols.map((protocol) => (
          <Tr key={protocol.id}>
            <Td>
              <Link href={`/site/protocols/${protocol.id}`} className="text-link font-semibold">
                {protocol.name}
              </Link>
              {protocol.archived && <Badge className="ml-3">out of the lists</Badge>}
            </Td>
            <Td>{REGION_WORDS[protocol.region]}</Td>
            <Td className="figures">{protocol.sequenceCount}</Td>
            <Td className="figures">{protocol.version}</Td>
            <Td className="whitespace-nowrap">{formatMoment(new Date(protocol.changedAt))}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
