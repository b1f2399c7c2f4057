import type { SiteTransaction } from '@/db/client';
import { listTaken } from '@/db/queries/move-proposal/move-proposals';
import { listSessions } from '@/db/queries/scanner-session/scanner-sessions';
import { checkBookingOn, standingOf } from '@/lib/domain/pre-check/pre-check';
import { freeSlots, freeSpans, type Session } from '@/lib/domain/pre-check/room';
import type { Suggestion, Suggestions } from '@/lib/schemas/move-proposal';
import type { CheckSetup } from '../pre-check/read-question';

const DAY_MS = 86_400_000;
/** Days looked at round the booked one, and places named on each scanner. */
const DAYS_BEFORE = 3;
const DAYS_AFTER = 14;
const PLACES = 6;
/**
 * How soon a place is offered: a full hour at least two hours away. Someone must change the booking, reach the patient
 * and have them come and change; common practice, no source. A sooner place can still be typed, for who is here already.
 */
const NOTICE_MS = 2 * 3_600_000;

function soonestOffered(now: Date): Date {
  const soonest = new Date(now.getTime() + NOTICE_MS);
  const onTheHour = soonest.getMinutes() + soonest.getSeconds() + soonest.getMilliseconds() === 0;
  // The site's clock: a zone may lie a half hour off.
  soonest.setHours(soonest.getHours() + (onTheHour ? 0 : 1), 0, 0, 0);
  return soonest;
}

/** The span in which another place is looked for: never before the soonest that can be kept. */
export function searchSpan(scheduledAt: Date, now: Date): { readonly from: Date; readonly before: Date } {
  const from = new Date(Math.max(soonestOffered(now).getTime(), scheduledAt.getTime() - DAYS_BEFORE * DAY_MS));
  return { from, before: new Date(Math.max(from.getTime(), scheduledAt.getTime()) + DAYS_AFTER * DAY_MS) };
}

/** Scan and set-up on whole five minutes, never shorter than what is booked. */
export function slotFor(setup: CheckSetup): number {
  const { scanMinutes } = checkBookingOn(setup.question, setup.question.scanner, false);
  const needed = scanMinutes > 0 ? Math.ceil((scanMinutes + setup.question.pathway.setUpMinutes) / 5) * 5 : 0;
  return Math.min(480, Math.max(setup.booking.slotMinutes, needed));
}

/** Sessions of every scanner in a span with what is taken out of them, the booking's own place given back. */
export async function readRoom(
  trx: SiteTransaction,
  siteId: string,
  span: { readonly from: Date; readonly before: Date },
  exceptBookingId?: string,
): Promise<(scannerId: string) => { readonly sessions: readonly Session[]; readonly free: readonly Session[] }> {
  const sessions = await listSessions(trx, siteId, span);
  // A slot that began the day before may still run into the span.
  const taken = await listTaken(trx, siteId, { from: new Date(span.from.getTime() - DAY_MS), before: span.before });
  return (scannerId) => {
    const own = sessions.filter((session) => session.scannerId === scannerId);
    const busy = taken.filter((one) => one.scannerId === scannerId && one.bookingId !== exceptBookingId);
    return { sessions: own, free: freeSpans(own, busy) };
  };
}

/** Every scanner in use with whether this booking can work on it, and where it has room. */
export async function findPlaces(trx: SiteTransaction, siteId: string, setup: CheckSetup, now: Date): Promise<Suggestions> {
  const { booking, question } = setup;
  const span = searchSpan(booking.scheduledAt, now);
  const slotMinutes = slotFor(setup);
  const room = await readRoom(trx, siteId, span, booking.id);
  const scanners = [question.scanner, ...question.others].map((scanner): Suggestion => {
    const { scannerId, scannerName, standing, reason } = standingOf(checkBookingOn(question, scanner, false));
    const { sessions, free } = room(scannerId);
    const begun = free.map((one) => ({ ...one, startsAt: new Date(Math.max(one.startsAt.getTime(), span.from.getTime())) }));
    return {
      scannerId, scannerName, standing, reason,
      ...(sessions.length === 0 ? {} : { starts: freeSlots(begun, slotMinutes, PLACES).map((start) => start.toISOString()) }),
    };
  });
  return { slotMinutes, scanners };
}
