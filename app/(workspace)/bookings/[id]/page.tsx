import type { Metadata } from 'next';
import { BookingFacts } from '@/components/booking/booking-facts';
import { toBookingRow } from '@/components/booking/booking-row';
import { ReadingForm } from '@/components/booking/reading-form';
import { SizeRecord } from '@/components/booking/size-record';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { getBooking } from '@/lib/services/booking/get-booking';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { addReadings } from '../actions';

export const metadata: Metadata = { title: 'Booking' };

export default async function BookingPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const { booking, record, mayRecord } = await loadPage(async (context) => ({
    booking: await getBooking(context, { id }),
    record: await getSizeRecord(context, { bookingId: id }),
    mayRecord: mayAttempt(context.actor, 'size-reading.record'),
  }));
  const row = toBookingRow(booking);
  return (
    <PageBody>
      <PageHeader
        title={<span className="figures">{row.accession}</span>}
        lead={`${row.day}, ${row.time}`}
        back={{ href: '/bookings', label: 'Bookings' }}
        actions={
          <>
            {booking.planId && <LinkButton href={`/plans/${booking.planId}`}>Open the plan</LinkButton>}
            <LinkButton href={`/bench/${id}`} variant={record.missing.length > 0 ? 'secondary' : 'primary'}>
              Open the bench
            </LinkButton>
          </>
        }
      />
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,5fr)_minmax(0,9fr)]">
        <BookingFacts row={row} />
        <section id="sizes" aria-labelledby="sizes-title" className="space-y-4">
          <h2 id="sizes-title" className="text-xl">
            Size record
          </h2>
          <SizeRecord record={record} />
          {mayRecord && <ReadingForm today={dayKey(new Date())} add={addReadings.bind(null, id)} />}
        </section>
      </div>
    </PageBody>
  );
}
