'use client';

import Link from 'next/link';
import { Panel } from '@/components/ui/panel';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import type { WeekChange, WeekView } from '@/lib/schemas/pre-check';

export type ShownChange = WeekChange & { readonly when: string };

/** More than this is an import, not news: it waits behind its count. */
const OPEN_AT_MOST = 12;

function ChangeTable({ caption, rows, count, withBefore }: { caption: string; rows: readonly ShownChange[]; count: number; withBefore: boolean }) {
  return (
    <>
      <Table caption={caption}>
        <thead><tr><Th>When booked</Th><Th>Accession</Th><Th>Scanner</Th>{withBefore && <Th>Before</Th>}<Th>Now</Th></tr></thead>
        <tbody>
          {rows.map((change) => (
            <Tr key={change.bookingId}>
              <Td className="figures whitespace-nowrap">{change.when}</Td>
              <Td><Link href={`/bookings/${change.bookingId}`} className="text-link figures font-semibold whitespace-nowrap">{change.accession}</Link></Td>
              <Td className="whitespace-nowrap">{change.scannerName}</Td>
              {withBefore && <Td className="whitespace-nowrap">{RESULT_WORDS[change.before ?? 'unchecked']}</Td>}
              <Td className="whitespace-nowrap">{RESULT_WORDS[change.result ?? 'unchecked']}</Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      {count > rows.length && <p className="mt-3 text-sm text-ink-soft">The first {rows.length} of {count}; all of them are in the table of bookings.</p>}
    </>
  );
}

/** Bookings whose result is another one than 24 hours ago and, apart from them, those that came since. */
export function WeekChanges({ changes, added, changeCounts }: Pick<WeekView, 'changeCounts'> & { changes: readonly ShownChange[]; added: readonly ShownChange[] }) {
  if (changeCounts.changed + changeCounts.added === 0) return <p className="text-ink-soft">Nothing changed in the last 24 hours.</p>;
  return (
    <div className="space-y-4">
      {changeCounts.changed === 0 ? <p className="text-ink-soft">No result changed in the last 24 hours.</p> : (
        <Panel title={`${changeCounts.changed} with another result`} level={3} collapsible defaultOpen={changeCounts.changed <= OPEN_AT_MOST}>
          <ChangeTable caption="Another result than 24 hours ago" rows={changes} count={changeCounts.changed} withBefore />
        </Panel>
      )}
      {changeCounts.added > 0 && (
        <Panel title={`${changeCounts.added} new`} level={3} collapsible defaultOpen={false} summary="Added in the last 24 hours">
          <ChangeTable caption="Added in the last 24 hours" rows={added} count={changeCounts.added} withBefore={false} />
        </Panel>
      )}
    </div>
  );
}
