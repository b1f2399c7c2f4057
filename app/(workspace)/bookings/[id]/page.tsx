import type { Metadata } from 'next';
import { BookingFacts } from '@/components/booking/booking-facts';
import { toBookingRow } from '@/components/booking/booking-row';
import { ReadingForm } from '@/components/booking/reading-form';
import { SizeRecord } from '@/components/booking/size-record';
import { KeepClearRequestPanel } from '@/components/keep-clear-request/request-panel';
import { OutcomeSection } from '@/components/outcome/outcome-section';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { getBooking } from '@/lib/services/booking/get-booking';
import { getKeepClearRequest } from '@/lib/services/keep-clear-request/get-keep-clear-request';
import { listOutcomes } from '@/lib/services/outcome/list-outcomes';
import { getPlan } from '@/lib/services/plan/get-plan';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { addReadings, askKeepClear } from '../actions';

export const metadata: Metadata = { title: 'Booking' };

export default async function BookingPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const { booking, record, requested, plan, outcomes, may } = await loadPage(async (context) => {
    const booking = await getBooking(context, { id });
    const { planId } = booking;
    return {
      booking,
      record: await getSizeRecord(context, { bookingId: id }),
      requested: await getKeepClearRequest(context, { bookingId: id }),
      plan: planId ? await getPlan(context, { id: planId }) : null,
      outcomes: planId ? (await listOutcomes(context, { planId })).outcomes : [],
      may: {
        record: mayAttempt(context.actor, 'size-reading.record'),
        plan: mayAttempt(context.actor, 'plan.edit'),
        ask: mayAttempt(context.actor, 'keep-clear.request'),
      },
    };
  });
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
            {may.plan && record.missing.length === 0 && <LinkButton href={`/bench/${id}/at-scanner`}>At the scanner</LinkButton>}
            <LinkButton href={`/bench/${id}`} variant={record.missing.length > 0 ? 'secondary' : 'primary'}>
              Open the bench
            </LinkButton>
          </>
        }
      />
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,5fr)_minmax(0,9fr)]">
        <div>
          <BookingFacts row={row} />
          <KeepClearRequestPanel region={booking.region} requested={requested} ask={may.ask ? askKeepClear.bind(null, id) : undefined} />
          {plan && <OutcomeSection plan={plan} outcomes={outcomes} />}
        </div>
        <section id="sizes" aria-labelledby="sizes-title" className="space-y-4">
          <h2 id="sizes-title" className="text-xl">
            Size record
          </h2>
          <SizeRecord record={record} />
          {may.record && <ReadingForm today={dayKey(new Date())} add={addReadings.bind(null, id)} />}
        </section>
      </div>
    </PageBody>
  );
}
