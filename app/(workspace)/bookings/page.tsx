import type { Metadata } from 'next';
import Link from 'next/link';
import { toBookingRow } from '@/components/booking/booking-row';
import { BookingTable } from '@/components/booking/booking-table';
import { DayRange } from '@/components/booking/day-range';
import { dayRange } from '@/components/booking/requested-days';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { listBookings } from '@/lib/services/booking/list-bookings';

export const metadata: Metadata = { title: 'Bookings' };

interface Props {
  searchParams: Promise<{ from?: string; to?: string; after?: string }>;
}

export default async function BookingsPage({ searchParams }: Props) {
  const query = await searchParams;
  const { from, to } = dayRange(query, new Date());
  const { page, mayAdd } = await loadPage(async (context) => ({
    page: await listBookings(context, {
      from,
      to,
      limit: 200,
      ...(query.after ? { after: query.after } : {}),
    }),
    mayAdd: mayAttempt(context.actor, 'booking.create'),
  }));
  const add = mayAdd && (
    <LinkButton href="/bookings/new" variant="primary">
      Add a booking
    </LinkButton>
  );
  const days = <DayRange from={from} to={to} />;
  return (
    <PageBody wide>
      <PageHeader
        title="Bookings"
        lead="Under accession numbers; no names, no dates of birth."
        actions={add}
      />
      {page.bookings.length === 0 ? (
        <div className="space-y-4">
          {days}
          <EmptyState title="No bookings on these days" action={add}>
            Choose other days above{mayAdd ? ', or add one' : ''}.
          </EmptyState>
        </div>
      ) : (
        <BookingTable rows={page.bookings.map(toBookingRow)} days={days} />
      )}
      {page.next && (
        <p className="mt-4">
          <Link
            className="text-link"
            href={`/bookings?${new URLSearchParams({ from, to, after: page.next })}`}
          >
            Later bookings of these days
          </Link>
        </p>
      )}
    </PageBody>
  );
}
