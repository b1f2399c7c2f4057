import Link from 'next/link';
import { LinkButton } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import type { RESULT_FILTERS } from '@/lib/schemas/pre-check';
import type { BookingRow } from './booking-row';
import { tableHref } from './table-query';

/** What must be done with each, in the words of the day. */
const NEXT_STEP: Readonly<Record<(typeof RESULT_FILTERS)[number], string>> = {
  escalate: 'nothing here works; a lead decides',
  'another-scanner': 'the booked scanner or time cannot work',
  'size-needed': 'a size is missing, too old or must be measured',
  'plan-needed': 'a radiographer plans them',
  'as-booked': 'nothing to do',
  unchecked: 'the check is on its way',
};
const ORDER = ['escalate', 'another-scanner', 'size-needed', 'plan-needed', 'unchecked', 'as-booked'] as const;

/** The coordinator's work, worst first: each line opens the bookings it counts. */
export function CoordinatorDay({ counts, days, from, to, openMoves, undelivered, escalated }: {
  counts: Readonly<Record<string, number>>;
  days: number;
  from: string;
  to: string;
  openMoves: number;
  undelivered: number;
  escalated: readonly BookingRow[];
}) {
  return (
    <section aria-label="Bookings to see to" className="mb-8 grid grid-cols-[minmax(0,1fr)] gap-6 lg:grid-cols-2">
      <Panel title={`Bookings of the next ${days} days`} aside={<Link className="text-link" href="/bookings/week">The week</Link>}>
        <ul className="divide-y divide-line">
          {ORDER.filter((id) => (counts[id] ?? 0) > 0).map((id) => (
            <li key={id}>
              <Link href={tableHref({}, { from, to, result: id, sort: 'time' })} className="flex gap-4 rounded py-2 text-ink no-underline hover:bg-sunk">
                <span className="figures w-12 text-right text-xl">{counts[id]}</span>
                <span><span className="font-semibold">{RESULT_WORDS[id]}</span><span className="block text-sm text-ink-soft">{NEXT_STEP[id]}</span></span>
              </Link>
            </li>
          ))}
          {Object.keys(counts).length === 0 && <li className="py-2 text-ink-soft">Nothing is booked in these days.</li>}
        </ul>
      </Panel>
      <div className="space-y-6">
        <Panel title="Change in your booking system">
          <p className="flex flex-wrap items-center justify-between gap-3">
            <span><span className="figures text-xl">{openMoves}</span> proposed {openMoves === 1 ? 'move is' : 'moves are'} not made yet</span>
            <LinkButton href="/bookings/moves" size="sm">Open the list</LinkButton>
          </p>
        </Panel>
        {undelivered > 0 && (
          <Panel title="Mail">
            <p className="flex flex-wrap items-center justify-between gap-3">
              <span><span className="figures text-xl">{undelivered}</span> {undelivered === 1 ? 'mail was' : 'mails were'} not accepted by the mail server</span>
              <LinkButton href="/site/mail" size="sm">See which</LinkButton>
            </p>
          </Panel>
        )}
        <Panel title="A lead was asked to decide">
          {escalated.length === 0 ? <p className="text-ink-soft">Nothing waits for a lead.</p> : (
            <ul className="space-y-1">
              {escalated.map(({ id, accession, day, time }) => (
                <li key={id}><Link href={`/bookings/${id}#lead`} className="text-link figures">{accession}</Link> <span className="text-ink-soft">{day}, {time}</span></li>
              ))}
            </ul>
          )}
        </Panel>
      </div>
    </section>
  );
}
