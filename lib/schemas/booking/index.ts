import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { BodyRegion, Verdict } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';
import type { NextActionKind, PreCheckResult } from '@/lib/domain/pre-check/result';
import type { PlanView } from '@/lib/schemas/plan';
import type { KeepClearRequestView } from '@/lib/schemas/keep-clear-request';
import type { PolicyView } from '@/lib/schemas/site-policy';
import type { ProtocolView } from '@/lib/schemas/protocol';
import type { ScannerView } from '@/lib/schemas/scanner';
import type { SizeRecordView } from '@/lib/schemas/size-reading';
import { count, day, moment, refused, strict, words } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

export const createBookingInput = strict({
  accession: words(64, 'Accession or request number exactly as the worklist shows it; never a name or a date.'),
  scheduledAt: moment('Start of the slot.'),
  slotMinutes: count({ min: 5, max: 480, unit: 'minutes', text: 'Length of the slot' }),
  scannerId: idSchema.describe('Booked scanner.'),
  protocolId: idSchema.describe('Booked protocol.'),
});
export type CreateBooking = z.output<typeof createBookingInput>;

const listBookingsShape = {
  from: day('First day, YYYY-MM-DD; left out: today.').optional(),
  to: day('Last day, YYYY-MM-DD; left out: two weeks from the first.').optional(),
  limit: count({ min: 1, max: 200, text: 'Most bookings in one answer' }).default(50),
  after: z
    .string({ error: refused('the cursor of the page before') })
    .max(200, { error: refused('the cursor of the page before') })
    .describe('Cursor of the page before.')
    .optional(),
};
export const listBookingsInput = strict(listBookingsShape);
export type ListBookings = z.output<typeof listBookingsInput>;

/** The same as search parameters, where every value is text. */
export const listBookingsQuery = strict({
  ...listBookingsShape,
  limit: z
    .string()
    .regex(/^[0-9]{1,3}$/, { error: refused('a whole number, 1 to 200') })
    .transform(Number)
    .pipe(listBookingsShape.limit.unwrap())
    .describe('Most bookings in one answer, 1 to 200; left out: 50.')
    .optional(),
});

export interface BookingListItem {
  readonly id: string;
  readonly accession: string;
  readonly scheduledAt: string;
  readonly slotMinutes: number;
  readonly region: BodyRegion;
  readonly scannerId: string;
  readonly scannerName: string;
  readonly protocolId: string;
  readonly protocolName: string;
  /** Worst verdict of its sequences, with the plan if there is one; absent until it was worked out. */
  readonly verdict?: Verdict;
  readonly planState?: PlanState;
  readonly planId?: string;
  readonly planShortCode?: string;
  /** Scan minutes of all sequences; absent until worked out. */
  readonly minutesNeeded?: number;
  readonly changedAt: string;
  /** What the last pre-check came to; absent until the first. */
  readonly result?: PreCheckResult;
  /** Minutes beyond the slot, set-up included; absent until checked. */
  readonly minutesOver?: number;
  readonly next?: { readonly kind: NextActionKind; readonly text: string };
  /** Something it rests on changed since; the next check is on its way. */
  readonly stale: boolean;
  readonly escalation?: 'open' | 'decided';
  readonly moveProposed: boolean;
  /** YYYY-MM-DD of surgery that changes the body's size; absent: none known. */
  readonly surgeryOn?: string;
  readonly version: number;
}

export interface BookingPage {
  readonly bookings: readonly BookingListItem[];
  /** Give as `after` for the next page; absent on the last. */
  readonly next?: string;
}

/** Everything the bench needs, in one answer. */
export interface BenchView {
  readonly booking: BookingListItem;
  readonly sizeRecord: SizeRecordView;
  readonly scanner: ScannerView;
  readonly protocol: ProtocolView;
  readonly policy: PolicyView;
  /** What a radiologist asked to be kept free of fold, laid into this patient. */
  readonly requested?: KeepClearRequestView;
  /** Newest plan of the booking, if any. */
  readonly plan?: PlanView;
}
