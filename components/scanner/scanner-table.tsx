import Link from 'next/link';
import { Badge } from '@/components/ui/badge';
import { LinkButton } from '@/components/ui/button';
import { Figure } from '@/components/ui/figure';
import { EmptyState } from '@/components/ui/page';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { formatDate } from '@/lib/presentation/moment';
import { OVERSAMPLING_FORM_WORDS } from '@/lib/presentation/setup-words';
import type { ScannerView } from '@/lib/schemas/scanner';

export function ScannerTable({ scanners, mayEdit }: { scanners: readonly ScannerView[]; mayEdit: boolean }) {
  if (scanners.length === 0) {
    return (
      <EmptyState
        title="No scanner yet"
        action={
          mayEdit && (
            <LinkButton href="/site/scanners/new" variant="primary">
              Add the first scanner
            </LinkButton>
          )
        }
      >
        {mayEdit
          ? 'The bench needs one: its opening, its table, and the form it takes oversampling in.'
          : 'A lead of your site adds them here.'}
      </EmptyState>
    );
  }
  return (
    <Table caption="Scanners of this site">
      <thead>
        <tr>
          <Th>Scanner</Th>
          <Th>Field</Th>
          <Th>Opening</Th>
          <Th>Table limit</Th>
          <Th>Oversampling as</Th>
          <Th>Limits checked</Th>
          <Th>Version</Th>
        </tr>
      </thead>
      <tbody>
        {scanners.map(({ id, scanner, archived, limitsCheckedOn, limitsOwner, version }) => (
          <Tr key={id}>
            <Td>
              <Link href={`/site/scanners/${id}`} className="text-link font-semibold">
                {scanner.name}
              </Link>
              {archived && <Badge className="ml-3">out of the lists</Badge>}
            </Td>
            <Td>
              <Figure value={scanner.fieldStrengthT} unit="T" />
            </Td>
            <Td>
              <Figure value={scanner.boreDiameterMm / 10} unit="cm" />
            </Td>
            <Td>
              <Figure value={scanner.limits.tableLimitKg} unit="kg" />
            </Td>
            <Td>{OVERSAMPLING_FORM_WORDS[scanner.oversamplingForm]}</Td>
            <Td>
              {limitsCheckedOn ? formatDate(new Date(`${limitsCheckedOn}T12:00:00`)) : 'not said'}
              {limitsOwner && <span className="block text-sm text-ink-soft">{limitsOwner}</span>}
            </Td>
            <Td>
              <span className="figures">{version}</span>
            </Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
