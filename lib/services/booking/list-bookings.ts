import { inTransaction } from '@/db/client';
import { listBookings as readBookings } from '@/db/queries/booking/bookings';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { localDay, startOfDay } from '@/lib/domain/site/local-day';
import { type BookingPage, listBookingsInput } from '@/lib/schemas/booking';
import { parseInput } from '@/lib/schemas/parse-input';
import { readPlace, writePlace } from './booking-place';
import { nowOf, type ServiceContext } from '../context';
import { toBookingListItem } from './to-booking-view';

/** Days shown when no end is asked for. */
const DEFAULT_DAYS = 14;

function readCursor(text: string | undefined): { scheduledAt: Date; id: string } | undefined {
  if (text === undefined) return undefined;
  const place = readPlace(text);
  if (!place) throw invalidField('after', 'a cursor that no page gave; allowed: the “next” of the page before');
  return place;
}

/** Bookings between two days (of the site, both included), by time, in pages that nothing written meanwhile can shift. */
export async function listBookings(context: ServiceContext, input: unknown): Promise<BookingPage> {
  const { actor } = context;
  authorise(actor, 'booking.read');
  const asked = parseInput(listBookingsInput, input);
  const first = asked.from ?? localDay(nowOf(context));
  const from = startOfDay(first);
  const before = asked.to ? startOfDay(asked.to, 1) : startOfDay(first, DEFAULT_DAYS);
  if (before <= from) throw invalidField('to', `${asked.to ?? ''} given; allowed: ${asked.from ?? 'today'} or later`);
  const after = readCursor(asked.after);
  const found = await inTransaction(actor.siteId, (trx) =>
    readBookings(trx, actor.siteId, { from, before, limit: asked.limit, ...(after ? { after } : {}) }),
  );
  const page = found.slice(0, asked.limit);
  const last = page.at(-1);
  return {
    bookings: page.map(toBookingListItem),
    ...(found.length > page.length && last ? { next: writePlace(last) } : {}),
  };
}

/** The bookings of the day of the request, from its midnight on. */
export async function listTodaysBookings(context: ServiceContext): Promise<BookingPage> {
  const today = localDay(nowOf(context));
  return listBookings(context, { from: today, to: today, limit: 200 });
}
