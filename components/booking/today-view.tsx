import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/page';
import { BookingList } from './booking-list';
import type { BookingRow } from './booking-row';
import { NextBooking } from './next-booking';

function byDay(rows: readonly BookingRow[]): [string, BookingRow[]][] {
  const days = new Map<string, BookingRow[]>();
  for (const row of rows) days.set(row.dayKey, [...(days.get(row.dayKey) ?? []), row]);
  return [...days];
}

/** A slot that has begun is still the next one until it is over. */
function comingNext(rows: readonly BookingRow[], now: string): BookingRow | undefined {
  const ends = (row: BookingRow) => new Date(row.at).getTime() + row.slotMinutes * 60_000;
  return rows.find((row) => ends(row) > new Date(now).getTime());
}

export function TodayView({
  rows,
  today,
  now,
  mayAdd,
}: {
  rows: readonly BookingRow[];
  today: string;
  now: string;
  mayAdd: boolean;
}) {
  const next = comingNext(rows, now);
  const todays = rows.filter((row) => row.dayKey === today);
  const coming = byDay(rows.filter((row) => row.dayKey > today));
  return (
    <>
      {next && <NextBooking row={next} today={next.dayKey === today} />}
      {todays.length > 0 && next?.dayKey !== today && <h2 className="mb-2 text-lg">Today: every slot is over</h2>}
      {todays.length > 0 ? (
        <BookingList rows={todays} label="Today’s bookings" />
      ) : (
        <EmptyState
          title="No bookings today"
          action={
            mayAdd && (
              <LinkButton href="/bookings/new" variant={next ? 'secondary' : 'primary'}>
                Add a booking
              </LinkButton>
            )
          }
        >
          {coming.length > 0
            ? 'The coming days are below.'
            : 'Nothing is booked for the next seven days either.'}
        </EmptyState>
      )}
      {coming.map(([key, of]) => (
        <section key={key} aria-label={of[0]!.day} className="mt-8">
          <h2 className="mb-2 text-lg">{of[0]!.day}</h2>
          <BookingList rows={of} label={`Bookings on ${of[0]!.day}`} />
        </section>
      ))}
    </>
  );
}
