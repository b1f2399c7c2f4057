import type { Metadata } from 'next';
import { BookingFacts } from '@/components/booking/booking-facts';
import { checkedStep, toBookingRow } from '@/components/booking/booking-row';
import { openMove, scannerPlaces, shownLines } from '@/components/booking/booking-words';
import { HistoryPanel } from '@/components/booking/history-panel';
import { LeadPanel } from '@/components/booking/lead-panel';
import { MovePanel } from '@/components/booking/move-panel';
import { PreCheckPanel } from '@/components/booking/pre-check-panel';
import { SurgeryForm } from '@/components/booking/surgery-form';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { dayKey, formatMoment } from '@/lib/presentation/moment';
import { getBookingPage } from '@/lib/services/pre-check/get-booking-page';
import { askLead, decideAsLead, noteBooking, proposePlace, setSurgery, withdrawPlace } from '../actions';
import { PlanLife } from './plan-life';
import { Sizes } from './sizes';

export const metadata: Metadata = { title: 'Booking' };

export default async function BookingPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const { booking, record, check, history, may, places, move } = await loadPage((context) => getBookingPage(context, { bookingId: id }));
  const row = toBookingRow(booking, may.plan);
  const today = dayKey(new Date());
  const asksSizes = check?.next.kind === 'ask-sizes' || check?.next.kind === 'measure';
  // What the check asks for comes right below it.
  const sizes = <Sizes bookingId={id} record={record} today={today} mayRecord={may.record} asked={asksSizes} />;
  return (
    <PageBody>
      <PageHeader
        title={<span className="figures">{row.accession}</span>}
        lead={`${row.day}, ${row.time}`}
        back={{ href: '/bookings', label: 'Bookings' }}
        actions={
          <>
            {booking.planId && <LinkButton href={`/plans/${booking.planId}`}>Open the plan</LinkButton>}
            {may.record && record.missing.length === 0 && <LinkButton href={`/bench/${id}/at-scanner`}>At the scanner</LinkButton>}
            <LinkButton href={`/bench/${id}`}>Open the bench</LinkButton>
          </>
        }
      />
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,5fr)_minmax(0,9fr)]">
        <div className="space-y-6">
          <BookingFacts row={row} />
          {may.record && <SurgeryForm key={booking.surgeryOn} surgeryOn={booking.surgeryOn ?? ''} today={today} save={setSurgery.bind(null, id)} />}
          <LeadPanel escalation={booking.escalation} ask={may.escalate ? askLead.bind(null, id) : undefined} decide={may.decide ? decideAsLead.bind(null, id) : undefined} />
          <HistoryPanel lines={shownLines(history)} addNote={may.note ? noteBooking.bind(null, id) : undefined} />
        </div>
        <div className="space-y-6">
          <PreCheckPanel check={check} checkedAt={check ? formatMoment(new Date(check.checkedAt)) : ''} next={checkedStep(booking, may.plan)} here={`/bookings/${id}`} />
          {asksSizes && sizes}
          {places && <MovePanel slotMinutes={places.slotMinutes} scanners={scannerPlaces(places)} open={openMove(move)} propose={proposePlace.bind(null, id)} withdraw={withdrawPlace.bind(null, id)} />}
          <PlanLife booking={booking} />
          {!asksSizes && sizes}
        </div>
      </div>
    </PageBody>
  );
}
