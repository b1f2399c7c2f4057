import Link from 'next/link';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import type { WeekChange } from '@/lib/schemas/pre-check';

/** Bookings that came, or whose result is another one than 24 hours ago. */
export function WeekChanges({ changes }: { changes: readonly (WeekChange & { readonly when: string })[] }) {
  if (changes.length === 0) return <p className="text-ink-soft">Nothing changed in the last 24 hours.</p>;
  return (
    <Table caption="Changed in the last 24 hours">
      <thead><tr><Th>When booked</Th><Th>Accession</Th><Th>Scanner</Th><Th>Before</Th><Th>Now</Th></tr></thead>
      <tbody>
        {changes.map((change) => (
          <Tr key={change.bookingId}>
            <Td className="figures whitespace-nowrap">{change.when}</Td>
            <Td><Link href={`/bookings/${change.bookingId}`} className="text-link figures font-semibold whitespace-nowrap">{change.accession}</Link></Td>
            <Td className="whitespace-nowrap">{change.scannerName}</Td>
            <Td className="whitespace-nowrap">{change.before ? RESULT_WORDS[change.before] : 'new'}</Td>
            <Td className="whitespace-nowrap">{RESULT_WORDS[change.result ?? 'unchecked']}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
