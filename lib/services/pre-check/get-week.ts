import { inTransaction } from '@/db/client';
import { readWeek, type WeekBooking } from '@/db/queries/booking/read-week';
import { listScanners } from '@/db/queries/scanner/scanners';
import { listSessions, type SessionRecord } from '@/db/queries/scanner-session/scanner-sessions';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { PRE_CHECK_RESULTS } from '@/lib/domain/pre-check/result';
import { localDay, startOfDay } from '@/lib/domain/site/local-day';
import type { WeekCell, WeekView } from '@/lib/schemas/pre-check';
import { nowOf, type ServiceContext } from '../context';

const DAYS = 7;
const DAY_MS = 86_400_000;
const MOST_CHANGES = 100;

const changedSince = ({ before, result }: WeekBooking): boolean => before !== null && before !== result;
const addedSince = ({ before, isNew }: WeekBooking): boolean => isNew && before === null;

function cellOf(day: string, scanner: { readonly id: string; readonly name: string }, bookings: readonly WeekBooking[], sessions: readonly SessionRecord[]): WeekCell {
  const results = Object.fromEntries([...PRE_CHECK_RESULTS, 'unchecked' as const].map((result) => [
    result, bookings.filter((one) => (one.result ?? 'unchecked') === result).length,
  ])) as WeekCell['results'];
  const known = bookings.filter(({ minutesNeeded }) => minutesNeeded !== null);
  return {
    day, scannerId: scanner.id, scannerName: scanner.name,
    bookings: bookings.length,
    results,
    minutesBooked: bookings.reduce((sum, { slotMinutes }) => sum + slotMinutes, 0),
    minutesNeeded: Math.round(known.reduce((sum, { minutesNeeded }) => sum + minutesNeeded!, 0)),
    minutesUnknown: bookings.length - known.length,
    ...(sessions.length === 0 ? {} : {
      sessionMinutes: sessions.reduce((sum, { startsAt, endsAt }) => sum + (endsAt.getTime() - startsAt.getTime()) / 60_000, 0),
    }),
    changed: bookings.filter(changedSince).length,
    added: bookings.filter(addedSince).length,
  };
}

/** Seven days by scanner: how many of each result, minutes booked against needed, and what changed in the last 24 hours. */
export async function getWeek(context: ServiceContext, input: { readonly from: string }): Promise<WeekView> {
  const { actor } = context;
  const { siteId } = actor;
  authorise(actor, 'booking.read');
  const first = startOfDay(input.from);
  if (!/^\d{4}-\d{2}-\d{2}$/.test(input.from) || Number.isNaN(first.getTime())) throw invalidField('from', `${input.from} given; allowed: a day`);
  const dayAt = (index: number) => startOfDay(input.from, index);
  const span = { from: first, before: dayAt(DAYS) };
  const since = new Date(nowOf(context).getTime() - DAY_MS);
  return inTransaction(siteId, async (trx) => {
    const bookings = await readWeek(trx, siteId, { ...span, since });
    const sessions = await listSessions(trx, siteId, span);
    const scanners = (await listScanners(trx, siteId, { includeArchived: true }))
      .filter(({ id, archivedAt }) => archivedAt === null || bookings.some(({ scannerId }) => scannerId === id))
      .map(({ id, document }) => ({ id, name: document.scanner.name }));
    const days = Array.from({ length: DAYS }, (_, index) => localDay(dayAt(index)));
    const cells = scanners.flatMap((scanner) => days.map((day) => cellOf(
      day, scanner,
      bookings.filter((one) => one.scannerId === scanner.id && localDay(one.scheduledAt) === day),
      sessions.filter((one) => one.scannerId === scanner.id && localDay(one.startsAt) === day),
    )));
    const shown = (some: readonly WeekBooking[]) => some.slice(0, MOST_CHANGES).map((one) => ({
      bookingId: one.id, accession: one.accession, scheduledAt: one.scheduledAt.toISOString(),
      scannerName: scanners.find(({ id }) => id === one.scannerId)?.name ?? '',
      before: one.before, result: one.result,
    }));
    const [changed, added] = [bookings.filter(changedSince), bookings.filter(addedSince)];
    return { days, scanners, cells, changes: shown(changed), added: shown(added), changeCounts: { changed: changed.length, added: added.length } };
  });
}
