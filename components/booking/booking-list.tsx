import Link from 'next/link';
import { LinkButton } from '@/components/ui/button';
import { Figure } from '@/components/ui/figure';
import type { BookingRow } from './booking-row';
import { BookingVerdict } from './booking-verdict';
import { ResultWords } from './result-words';

/** Bookings of one day, in the order of the day, each with its state and the next thing to do. */
export function BookingList({ rows, label }: { rows: readonly BookingRow[]; label: string }) {
  return (
    <ul
      aria-label={label}
      className="divide-y divide-line overflow-hidden rounded-md border border-line bg-paper"
    >
      {rows.map((row) => (
        <li
          key={row.id}
          className="grid grid-cols-[4.5rem_1fr] items-center gap-x-4 gap-y-2 px-4 py-3 md:grid-cols-[4.5rem_minmax(0,5fr)_minmax(0,4fr)_11rem]"
        >
          <p>
            <Figure value={row.time} className="text-lg" />
            <span className="block text-sm text-ink-soft">{row.slotMinutes} min</span>
          </p>
          <div className="min-w-0">
            <Link href={`/bookings/${row.id}`} className="text-link figures font-semibold whitespace-nowrap">
              {row.accession}
            </Link>
            <p className="truncate text-sm text-ink-soft">
              {row.protocol} · {row.scanner}
            </p>
          </div>
          <div className="col-start-2 min-w-0 md:col-start-auto">
            <BookingVerdict verdict={row.verdict} />
            <p className="mt-1 flex flex-wrap items-center gap-x-2 gap-y-1 text-sm text-ink-soft">
              <ResultWords result={row.result} stale={row.stale} /> {row.plan}
            </p>
          </div>
          <p className="col-start-2 md:col-start-auto md:text-right">
            <LinkButton href={row.next.href} size="sm" aria-label={`${row.next.label}, ${row.accession}`}>
              {row.next.label}
            </LinkButton>
          </p>
        </li>
      ))}
    </ul>
  );
}
