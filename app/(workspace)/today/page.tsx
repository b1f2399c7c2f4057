import type { Metadata } from 'next';
import { CoordinatorDay } from '@/components/booking/coordinator-day';
import { TodayView } from '@/components/booking/today-view';
import { toBookingRows } from '@/components/booking/booking-row';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { addDays, dayKey, formatLongDay } from '@/lib/presentation/moment';
import { listBookings } from '@/lib/services/booking/list-bookings';
import { getCoordinatorDay } from '@/lib/services/pre-check/get-coordinator-day';

export const metadata: Metadata = { title: 'Today' };

/** A week ahead is as far as a worklist is looked at from here; the rest is under Bookings. */
const DAYS_AHEAD = 7;

export default async function TodayPage() {
  const now = new Date();
  const { page, mayAdd, plans, work } = await loadPage(async (context) => ({
    work: mayAttempt(context.actor, 'booking.propose') ? await getCoordinatorDay(context) : null,
    page: await listBookings(context, {
      from: dayKey(now),
      to: dayKey(addDays(now, DAYS_AHEAD)),
      limit: 200,
    }),
    plans: mayAttempt(context.actor, 'plan.edit'),
    mayAdd: mayAttempt(context.actor, 'booking.create'),
  }));
  const rows = toBookingRows(page.bookings, plans);
  return (
    <PageBody>
      <PageHeader
        title="Today"
        lead={formatLongDay(now)}
        actions={
          <>
            <LinkButton href="/quick-check">Quick check</LinkButton>
            {mayAdd && <LinkButton href="/bookings/new">Add a booking</LinkButton>}
            <LinkButton href="/bookings" variant="quiet">
              All bookings
            </LinkButton>
          </>
        }
      />
      {work && (
        <CoordinatorDay
          {...work}
          from={dayKey(now)}
          to={dayKey(addDays(now, work.days - 1))}
          escalated={toBookingRows(work.escalated, plans)}
        />
      )}
      <TodayView rows={rows} today={dayKey(now)} now={now.toISOString()} mayAdd={mayAdd} />
    </PageBody>
  );
}
