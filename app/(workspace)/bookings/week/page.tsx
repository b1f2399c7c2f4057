import type { Metadata } from 'next';
import { BookingViews } from '@/components/booking/booking-views';
import { dayRange } from '@/components/booking/requested-days';
import { WeekChanges, type ShownChange } from '@/components/booking/week-changes';
import { WeekGrid } from '@/components/booking/week-grid';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { addDays, dayKey, formatDay, formatTime } from '@/lib/presentation/moment';
import { PLANNING_ESTIMATE } from '@/lib/presentation/pre-check-words';
import type { WeekChange } from '@/lib/schemas/pre-check';
import { getWeek } from '@/lib/services/pre-check/get-week';

export const metadata: Metadata = { title: 'The week' };

const WEEK = 7;
/** Written on the server, so that every browser prints the same time. */
function shown(change: WeekChange): ShownChange {
  const at = new Date(change.scheduledAt);
  return { ...change, when: `${formatDay(at)}, ${formatTime(at)}` };
}
const noon = (day: string) => new Date(`${day}T12:00:00`);

export default async function WeekPage({ searchParams }: { searchParams: Promise<{ from?: string }> }) {
  const query = await searchParams;
  const from = query.from ? dayRange({ from: query.from, to: query.from }, new Date()).from : dayKey(new Date());
  const week = await loadPage((context) => getWeek(context, { from }));
  const shift = (days: number) => `/bookings/week?from=${dayKey(addDays(noon(from), days))}`;
  return (
    <PageBody wide>
      <PageHeader
        title="The week"
        lead={`How many of each result, minutes booked against needed (scan and set-up), room left. ${PLANNING_ESTIMATE}`}
        actions={
          <>
            <LinkButton href={shift(-WEEK)}>Earlier week</LinkButton>
            <LinkButton href="/bookings/week">From today</LinkButton>
            <LinkButton href={shift(WEEK)}>Later week</LinkButton>
          </>
        }
      />
      <BookingViews current="week" />
      {week.scanners.length === 0 ? (
        <EmptyState title="No scanner yet">A lead of your site adds them under Site.</EmptyState>
      ) : (
        <WeekGrid week={week} dayWords={Object.fromEntries(week.days.map((day) => [day, formatDay(noon(day))]))} />
      )}
      <h2 className="mt-8 mb-3 text-xl">Changed since yesterday</h2>
      <WeekChanges changeCounts={week.changeCounts} changes={week.changes.map(shown)} added={week.added.map(shown)} />
    </PageBody>
  );
}
