import { inTransaction } from '@/db/client';
import { listBookings as readBookings, type BookingOverview } from '@/db/queries/booking/bookings';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { type BookingPage, listBookingsInput } from '@/lib/schemas/booking';
import { parseInput } from '@/lib/schemas/parse-input';
import { nowOf, type ServiceContext } from '../context';
import { toBookingListItem } from './to-booking-view';

const DAY_MS = 86_400_000;
/** Days shown when no end is asked for. */
const DEFAULT_DAYS = 14;
const CURSOR = /^(\d{4}-\d{2}-\d{2}T\d{2}:\d{2}:\d{2}\.\d{3}Z)_([0-9a-f-]{36})$/;

const startOf = (day: string): Date => new Date(`${day}T00:00:00Z`);

function readCursor(text: string | undefined): { scheduledAt: Date; id: string } | undefined {
  if (text === undefined) return undefined;
  const [, at, id] = CURSOR.exec(text) ?? [];
  if (!at || !id) throw invalidField('after', 'a cursor that no page gave; allowed: the “next” of the page before');
  return { scheduledAt: new Date(at), id };
}

const cursorOf = (booking: BookingOverview): string => `${booking.scheduledAt.toISOString()}_${booking.id}`;

/** Bookings between two days (UTC, both included), by time, in pages that nothing written meanwhile can shift. */
export async function listBookings(context: ServiceContext, input: unknown): Promise<BookingPage> {
  const { actor } = context;
  authorise(actor, 'booking.read');
  const asked = parseInput(listBookingsInput, input);
  const from = asked.from ? startOf(asked.from) : startOf(nowOf(context).toISOString().slice(0, 10));
  const before = asked.to
    ? new Date(startOf(asked.to).getTime() + DAY_MS)
    : new Date(from.getTime() + DEFAULT_DAYS * DAY_MS);
  if (before <= from) throw invalidField('to', `${asked.to ?? ''} given; allowed: ${asked.from ?? 'today'} or later`);
  const after = readCursor(asked.after);
  const found = await inTransaction(actor.siteId, (trx) =>
    readBookings(trx, actor.siteId, { from, before, limit: asked.limit, ...(after ? { after } : {}) }),
  );
  const page = found.slice(0, asked.limit);
  const last = page.at(-1);
  return {
    bookings: page.map(toBookingListItem),
    ...(found.length > page.length && last ? { next: cursorOf(last) } : {}),
  };
}

/** The bookings of the day of the request, from its midnight on. */
export async function listTodaysBookings(context: ServiceContext): Promise<BookingPage> {
  const today = nowOf(context).toISOString().slice(0, 10);
  return listBookings(context, { from: today, to: today, limit: 200 });
}
