'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import { useStatus } from '@/components/ui/status';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { MailRow } from './mail-row';

function State({ row }: { row: MailRow }) {
  return (
    <>
      <p>{row.state}</p>
      {row.problem && <p className="max-w-prose text-sm break-words text-ink-soft">The mail server said: {row.problem}</p>}
    </>
  );
}

/** Mails of one state, with what the mail server said and the way to send them again. */
export function MailTable({ title, rows, empty, sendAgain }: {
  title: string;
  rows: readonly MailRow[];
  empty: string;
  sendAgain: (id: string) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  return (
    <section>
      <h2 className="mb-3 text-xl">{title}</h2>
      {rows.length === 0 ? (
        <p className="text-ink-soft">{empty}</p>
      ) : (
        <Table caption={title}>
          <thead><tr><Th>What</Th><Th>For</Th><Th>Since</Th><Th>State</Th><Th><span className="sr-only">Send again</span></Th></tr></thead>
          <tbody>
            {rows.map((row) => (
              <Tr key={row.id} className="align-top">
                <Td className="sm:whitespace-nowrap">{row.what}</Td>
                <Td className="min-w-40">
                  {row.to}
                  {row.booking && <> · <Link href={`/bookings/${row.booking.id}`} className="text-link figures whitespace-nowrap">{row.booking.accession}</Link></>}
                </Td>
                <Td className="whitespace-nowrap">{row.since}</Td>
                <Td className="min-w-40 sm:min-w-60"><State row={row} /></Td>
                <Td>
                  {row.maySendAgain && (
                    <ActionButton size="sm" action={() => sendAgain(row.id)} onDone={() => { say('The mail is on its way again.'); router.refresh(); }}>
                      Send again<span className="sr-only">: {row.what}, {row.to}</span>
                    </ActionButton>
                  )}
                </Td>
              </Tr>
            ))}
          </tbody>
        </Table>
      )}
    </section>
  );
}
