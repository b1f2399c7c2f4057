'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { Figure } from '@/components/ui/figure';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import type { BookingRow } from './booking-row';
import { BookingVerdict } from './booking-verdict';

const COLUMNS: readonly DataColumn<BookingRow>[] = [
  {
    id: 'when',
    header: 'When',
    value: (row) => `${row.at} ${row.day} ${row.time}`,
    cell: (row) => (
      <span className="whitespace-nowrap">
        {row.day} <Figure value={row.time} />
      </span>
    ),
  },
  {
    id: 'accession',
    header: 'Accession',
    value: (row) => row.accession,
    cell: (row) => (
      <Link href={`/bookings/${row.id}`} className="text-link figures font-semibold whitespace-nowrap">
        {row.accession}
      </Link>
    ),
  },
  { id: 'protocol', header: 'Protocol', value: (row) => row.protocol, cell: (row) => row.protocol },
  {
    id: 'scanner',
    header: 'Scanner',
    value: (row) => row.scanner,
    cell: (row) => <span className="whitespace-nowrap">{row.scanner}</span>,
  },
  {
    id: 'verdict',
    header: 'Worst verdict',
    value: (row) => (row.verdict ? VERDICT_WORDS[row.verdict] : 'Sizes needed'),
    cell: (row) => (
      <div className="min-w-44">
        <BookingVerdict verdict={row.verdict} />
      </div>
    ),
  },
  {
    id: 'minutes',
    header: 'Needs, slot',
    value: (row) => row.minutesNeeded ?? -1,
    cell: (row) => (
      <span className="whitespace-nowrap">
        <Figure value={row.minutesNeeded === undefined ? '–' : Math.ceil(row.minutesNeeded)} /> of{' '}
        <Figure value={row.slotMinutes} unit="min" />
      </span>
    ),
  },
  {
    id: 'plan',
    header: 'Plan',
    value: (row) => row.plan,
    cell: (row) => <span className="whitespace-nowrap">{row.plan}</span>,
  },
  {
    id: 'next',
    header: 'Next',
    value: (row) => row.next.label,
    cell: (row) => (
      <Link
        href={row.next.href}
        className="text-link whitespace-nowrap"
        aria-label={`${row.next.label}, ${row.accession}`}
      >
        {row.next.label}
      </Link>
    ),
  },
];

export function BookingTable({ rows, days }: { rows: readonly BookingRow[]; days: ReactNode }) {
  return (
    <DataTable
      caption="Bookings"
      columns={COLUMNS}
      rows={rows}
      searchLabel="Find in these bookings"
      aside={days}
      empty="No booking matches. Change the search, or widen the days above."
    />
  );
}
