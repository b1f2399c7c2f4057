import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { PRE_CHECK_RESULTS, type PreCheck, type PreCheckResult } from '@/lib/domain/pre-check/result';
import { choice, count, day, flag, refused, strict, words } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

export const BOOKING_SORTS = ['time', 'result', 'over', 'changed'] as const;
export type BookingSort = (typeof BOOKING_SORTS)[number];
export const RESULT_FILTERS = [...PRE_CHECK_RESULTS, 'unchecked'] as const;

/** What the bookings table is asked for; the page's address and the download carry the same. */
export const bookingTableInput = strict({
  from: day('First day.'),
  to: day('Last day.'),
  result: choice(RESULT_FILTERS, 'Pre-check result.').optional(),
  scanner: idSchema.optional(),
  protocol: idSchema.optional(),
  find: words(64, 'Part of an accession number.').optional(),
  sort: choice(BOOKING_SORTS, 'What it is ordered by.').default('time'),
  descending: flag('Backwards.').default(false),
  limit: count({ min: 1, max: 200, text: 'Most bookings in one answer' }).default(50),
  after: z.string({ error: refused('the cursor of the page before') }).max(400, { error: refused('the cursor of the page before') }).optional(),
});
export type BookingTableInput = z.input<typeof bookingTableInput>;

const MANY = 200;
const error = refused(`1 to ${MANY} bookings`);
export const manyBookingsInput = strict({
  bookingIds: z.array(idSchema, { error }).min(1, { error }).max(MANY, { error }).describe('Bookings to act on.'),
});

export const surgeryInput = strict({
  bookingId: idSchema,
  surgeryOn: z.union([z.literal(''), day('Day of the surgery.')]).describe('Day of surgery that changes the body’s size; empty: none.'),
});

/** The newest check of a booking as pages show it. */
export interface PreCheckView extends PreCheck {
  readonly number: number;
  readonly checkedAt: string;
  readonly stale: boolean;
}

export interface WeekCell {
  readonly day: string;
  readonly scannerId: string;
  readonly scannerName: string;
  readonly bookings: number;
  readonly results: Readonly<Record<PreCheckResult | 'unchecked', number>>;
  readonly minutesBooked: number;
  readonly minutesNeeded: number;
  /** Bookings whose minutes are not known yet. */
  readonly minutesUnknown: number;
  /** Minutes of sessions; absent: room unknown. */
  readonly sessionMinutes?: number;
  readonly changed: number;
  readonly added: number;
}

export interface WeekChange {
  readonly bookingId: string;
  readonly accession: string;
  readonly scheduledAt: string;
  readonly scannerName: string;
  readonly before: PreCheckResult | null;
  readonly result: PreCheckResult | null;
}

export interface WeekView {
  readonly days: readonly string[];
  readonly scanners: readonly { readonly id: string; readonly name: string }[];
  readonly cells: readonly WeekCell[];
  /** Whose result is another one than a day ago, and what came since; the first ones of each, all of them counted. */
  readonly changes: readonly WeekChange[];
  readonly added: readonly WeekChange[];
  readonly changeCounts: { readonly changed: number; readonly added: number };
}
