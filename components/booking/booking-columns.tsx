import Link from 'next/link';
import type { ReactNode } from 'react';
import { Badge } from '@/components/ui/badge';
import { Figure } from '@/components/ui/figure';
import type { BookingSort } from '@/lib/schemas/pre-check';
import type { BookingRow } from './booking-row';
import { BookingVerdict } from './booking-verdict';
import { ResultWords } from './result-words';

export interface BookingColumn {
  readonly id: string;
  readonly header: string;
  /** What the database can order by. */
  readonly sort?: BookingSort;
  readonly cell: (row: BookingRow) => ReactNode;
}

export const BOOKING_COLUMNS: readonly BookingColumn[] = [
  {
    id: 'when', header: 'When', sort: 'time',
    cell: (row) => <span className="whitespace-nowrap">{row.day} <Figure value={row.time} /></span>,
  },
  {
    id: 'accession', header: 'Accession',
    cell: (row) => (
      <Link href={`/bookings/${row.id}`} className="text-link figures font-semibold whitespace-nowrap">{row.accession}</Link>
    ),
  },
  {
    id: 'booked', header: 'Booked',
    cell: (row) => (
      <div className="min-w-36">
        {row.scanner}
        <span className="block text-sm text-ink-soft">{row.protocol}</span>
        {row.moveProposed && <Badge edge="dotted" tone="tried">move proposed</Badge>}
      </div>
    ),
  },
  {
    id: 'result', header: 'Pre-check', sort: 'result',
    cell: (row) => (
      <div className="min-w-36">
        <ResultWords result={row.result} stale={row.stale} />
        {row.escalation && <span className="block text-sm text-ink-soft">{row.escalation === 'open' ? 'a lead was asked' : 'a lead decided'}</span>}
      </div>
    ),
  },
  { id: 'verdict', header: 'Worst verdict', cell: (row) => <div className="min-w-40"><BookingVerdict verdict={row.verdict} /></div> },
  {
    id: 'over', header: 'Over the slot', sort: 'over',
    cell: (row) => (
      <span className="whitespace-nowrap">
        {row.minutesOver === undefined || row.minutesNeeded === undefined
          ? <span className="text-ink-soft">not known</span>
          : <Figure value={row.minutesOver > 0 ? `+${Math.ceil(row.minutesOver)}` : '0'} unit={`min of ${row.slotMinutes}`} />}
      </span>
    ),
  },
  { id: 'plan', header: 'Plan', cell: (row) => <span className="whitespace-nowrap">{row.plan}</span> },
  { id: 'changed', header: 'Changed', sort: 'changed', cell: (row) => <span className="text-sm whitespace-nowrap text-ink-soft">{row.changed}</span> },
  {
    id: 'next', header: 'Next',
    cell: (row) => (
      <Link href={row.next.href} className="text-link inline-block min-w-32" aria-label={`${row.next.label}, ${row.accession}`}>{row.next.label}</Link>
    ),
  },
];
