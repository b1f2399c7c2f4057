'use client';

import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import { Figure } from '@/components/ui/figure';
import { useStatus } from '@/components/ui/status';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { ActionResult } from '@/lib/schemas/action-result';

export interface SessionRow {
  readonly id: string;
  readonly scanner: string;
  readonly day: string;
  readonly span: string;
  readonly minutes: number;
  readonly minutesFree: number;
}

/** Sessions with the room that is left in each. */
export function SessionList({ rows, remove }: { rows: readonly SessionRow[]; remove?: (id: string) => Promise<ActionResult<unknown>> }) {
  const router = useRouter();
  const { say } = useStatus();
  return (
    <Table caption="Scanner sessions">
      <thead>
        <tr><Th>Day</Th><Th>From, to</Th><Th>Scanner</Th><Th className="text-right">Room left</Th>{remove && <Th><span className="sr-only">Remove</span></Th>}</tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Tr key={row.id}>
            <Td className="whitespace-nowrap">{row.day}</Td>
            <Td className="figures whitespace-nowrap">{row.span}</Td>
            <Td className="whitespace-nowrap">{row.scanner}</Td>
            <Td className="text-right"><Figure value={row.minutesFree} unit={`of ${row.minutes} min`} /></Td>
            {remove && (
              <Td>
                <ActionButton
                  variant="quiet"
                  action={() => remove(row.id)}
                  onDone={() => { say('The session was removed. What is booked in it stays.'); router.refresh(); }}
                  confirm={{ question: `Remove ${row.scanner}, ${row.day}, ${row.span}? What is booked in it stays.`, yes: 'Remove it', no: 'Keep it' }}
                >
                  Remove<span className="sr-only"> {row.scanner}, {row.day}, {row.span}</span>
                </ActionButton>
              </Td>
            )}
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
