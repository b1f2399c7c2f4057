import type { Verdict } from '@/lib/physics/model/assessment';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';
import { REGION_WORDS } from '@/lib/presentation/anatomy-words';
import { dayKey, formatDay, formatTime } from '@/lib/presentation/moment';
import type { BookingListItem } from '@/lib/schemas/booking';

/** A booking as lists print it. Made on the server, so that every browser prints the same time. */
export interface BookingRow {
  readonly id: string;
  readonly accession: string;
  readonly at: string;
  readonly dayKey: string;
  readonly day: string;
  readonly time: string;
  readonly slotMinutes: number;
  readonly scanner: string;
  readonly protocol: string;
  readonly region: string;
  readonly verdict?: Verdict;
  readonly minutesNeeded?: number;
  readonly plan: string;
  readonly result?: PreCheckResult;
  readonly minutesOver?: number;
  readonly stale: boolean;
  readonly moveProposed: boolean;
  readonly escalation?: 'open' | 'decided';
  readonly changed: string;
  readonly next: { readonly label: string; readonly href: string };
}

/** Who does not plan looks at the booking: from there sizes, another place, a note and a lead are asked for. */
const planning = (id: string, label: string, plans: boolean): BookingRow['next'] =>
  plans ? { label, href: `/bench/${id}` } : { label: 'Open the booking', href: `/bookings/${id}` };

/** The one thing to do with a booking now, for someone who plans or does not. */
export function nextStep(
  booking: Pick<BookingListItem, 'id' | 'verdict' | 'planState' | 'planId' | 'result'>,
  plans: boolean,
): BookingRow['next'] {
  const bench = `/bench/${booking.id}`;
  if (booking.planId && booking.planState && booking.planState !== 'draft') {
    return { label: 'Open the plan', href: `/plans/${booking.planId}` };
  }
  if (booking.planState === 'draft') return planning(booking.id, 'Finish the plan', plans);
  // What the pre-check passed needs no plan, whatever folds outside the keep-clear area.
  if (booking.result === 'as-booked') return { label: 'Look at the bench', href: bench };
  if (!booking.verdict) return { label: 'Enter sizes', href: `/bookings/${booking.id}#sizes` };
  return booking.verdict === 'no-fold-expected'
    ? { label: 'Look at the bench', href: bench }
    : planning(booking.id, 'Plan on the bench', plans);
}

export function planWords(state: BookingListItem['planState']): string {
  return state ? `plan: ${state}` : 'no plan yet';
}

/** Rows of a list, each with the next step of whoever reads it. */
export function toBookingRows(bookings: readonly BookingListItem[], plans: boolean): BookingRow[] {
  return bookings.map((booking) => toBookingRow(booking, plans));
}

export function toBookingRow(booking: BookingListItem, plans: boolean): BookingRow {
  const at = new Date(booking.scheduledAt);
  return {
    id: booking.id,
    accession: booking.accession,
    at: booking.scheduledAt,
    dayKey: dayKey(at),
    day: formatDay(at),
    time: formatTime(at),
    slotMinutes: booking.slotMinutes,
    scanner: booking.scannerName,
    protocol: booking.protocolName,
    region: REGION_WORDS[booking.region],
    ...(booking.verdict ? { verdict: booking.verdict } : {}),
    ...(booking.minutesNeeded === undefined ? {} : { minutesNeeded: booking.minutesNeeded }),
    plan: planWords(booking.planState),
    ...(booking.result ? { result: booking.result } : {}),
    ...(booking.minutesOver === undefined ? {} : { minutesOver: booking.minutesOver }),
    stale: booking.stale,
    moveProposed: booking.moveProposed,
    ...(booking.escalation ? { escalation: booking.escalation } : {}),
    changed: `${formatDay(new Date(booking.changedAt))}, ${formatTime(new Date(booking.changedAt))}`,
    next: checkedStep(booking, plans) ?? nextStep(booking, plans),
  };
}

/** What a check says to do, and where it is done. */
export function checkedStep(
  { id, next, result }: Pick<BookingListItem, 'id' | 'next' | 'result'>,
  plans: boolean,
): BookingRow['next'] | undefined {
  if (!next || !result || next.kind === 'none') return undefined;
  const booking = `/bookings/${id}`;
  switch (next.kind) {
    case 'plan':
    case 'finish-plan':
      return planning(id, next.text, plans);
    case 'ask-sizes':
    case 'measure':
      return { label: next.kind === 'measure' ? 'Have it measured' : 'Enter or ask for sizes', href: `${booking}#sizes` };
    case 'propose':
    case 'propose-time':
      return { label: next.text, href: `${booking}#move` };
    case 'escalate':
      return { label: next.text, href: `${booking}#lead` };
  }
}
