import type { Metadata } from 'next';
import Link from 'next/link';
import { BookingFilter } from '@/components/booking/booking-filter';
import { toBookingRows } from '@/components/booking/booking-row';
import { BookingTable } from '@/components/booking/booking-table';
import { BookingViews } from '@/components/booking/booking-views';
import { tableHref, tableQuery, type TableSearch } from '@/components/booking/table-query';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { PLANNING_ESTIMATE } from '@/lib/presentation/pre-check-words';
import { listBookingTable } from '@/lib/services/pre-check/list-booking-table';
import { listProtocols } from '@/lib/services/protocol/list-protocols';
import { listScanners } from '@/lib/services/scanner/list-scanners';
import { proposeChosen, recheckChosen } from './actions';

export const metadata: Metadata = { title: 'Bookings' };

export default async function BookingsPage({ searchParams }: { searchParams: Promise<TableSearch> }) {
  const search = await searchParams;
  const query = tableQuery(search, new Date());
  const { page, actor, scanners, protocols } = await loadPage(async (context) => ({
    page: await listBookingTable(context, query),
    actor: context.actor,
    scanners: await listScanners(context, { includeArchived: true }),
    protocols: await listProtocols(context, { includeArchived: true }),
  }));
  const add = mayAttempt(actor, 'booking.create') && <LinkButton href="/bookings/new" variant="primary">Add a booking</LinkButton>;
  return (
    <PageBody wide>
      <PageHeader title="Bookings" lead={`Under accession numbers; no names, no dates of birth. ${PLANNING_ESTIMATE}`} actions={<>{mayAttempt(actor, 'booking.import') && <LinkButton href="/bookings/import">Bring bookings in</LinkButton>}{add}</>} />
      <BookingViews current="table" />
      <BookingFilter
        search={search}
        days={query}
        counts={page.counts}
        scanners={scanners.map(({ id, scanner }) => ({ value: id, label: scanner.name }))}
        protocols={protocols.map(({ id, name }) => ({ value: id, label: name }))}
      />
      {page.bookings.length === 0 ? (
        <EmptyState title="No booking matches" action={add}>Choose other days or another filter above.</EmptyState>
      ) : (
        <BookingTable
          rows={toBookingRows(page.bookings, mayAttempt(actor, 'plan.edit'))}
          search={search}
          may={{ check: mayAttempt(actor, 'booking.check'), propose: mayAttempt(actor, 'booking.propose'), export: mayAttempt(actor, 'booking.export') }}
          doers={{ recheck: recheckChosen, propose: proposeChosen }}
        />
      )}
      <p className="mt-3 flex gap-6">
        {search.after && <Link className="text-link" href={tableHref(search, {})}>First page</Link>}
        {page.next && <Link className="text-link" href={tableHref(search, { after: page.next })}>Next {page.bookings.length} bookings</Link>}
      </p>
    </PageBody>
  );
}
