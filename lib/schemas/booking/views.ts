import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { PLAN_STATES } from '@/lib/domain/plan/states';
import { NEXT_ACTION_KINDS, PRE_CHECK_RESULTS } from '@/lib/domain/pre-check/result';
import type { BenchView, BookingListItem, BookingPage } from '@/lib/schemas/booking';
import { VERDICTS } from '@/lib/schemas/case/assessment';
import { REGIONS } from '@/lib/schemas/case/patient';
import { keepClearRequestViewSchema } from '@/lib/schemas/keep-clear-request';
import { planViewSchema } from '@/lib/schemas/plan/views';
import { protocolViewSchema } from '@/lib/schemas/protocol/views';
import { scannerViewSchema } from '@/lib/schemas/scanner/views';
import { policyViewSchema } from '@/lib/schemas/site-policy/views';
import { sizeRecordSchema } from '@/lib/schemas/size-reading/views';

export const bookingListItemSchema = z.strictObject({
  id: z.uuid(),
  accession: z.string(),
  scheduledAt: z.iso.datetime(),
  slotMinutes: z.int(),
  region: z.enum(REGIONS),
  scannerId: z.uuid(),
  scannerName: z.string(),
  protocolId: z.uuid(),
  protocolName: z.string(),
  verdict: z.enum(VERDICTS).describe('Worst verdict of its sequences; left out until it was worked out.').optional(),
  planState: z.enum(PLAN_STATES).optional(),
  planId: z.uuid().optional(),
  planShortCode: z.string().optional(),
  minutesNeeded: z.number().describe('Scan minutes of all sequences.').optional(),
  changedAt: z.iso.datetime(),
  result: z.enum(PRE_CHECK_RESULTS).describe('What the last pre-check came to; left out until the first. A planning estimate.').optional(),
  minutesOver: z.number().describe('Minutes beyond the slot, set-up included.').optional(),
  next: z.strictObject({ kind: z.enum(NEXT_ACTION_KINDS), text: z.string() }).optional(),
  stale: z.boolean().describe('Something the check rests on changed since; the next one is on its way.'),
  escalation: z.enum(['open', 'decided']).optional(),
  moveProposed: z.boolean().describe('A move is proposed; what is booked here has not followed yet.'),
  surgeryOn: z.iso.date().optional(),
  version: z.int(),
}) satisfies z.ZodType<BookingListItem>;

export const bookingPageSchema = z.strictObject({
  bookings: z.array(bookingListItemSchema),
  next: z.string().describe('Give as “after” for the next page; left out on the last.').optional(),
}) satisfies z.ZodType<BookingPage>;

export const benchViewSchema = z.strictObject({
  booking: bookingListItemSchema,
  sizeRecord: sizeRecordSchema,
  scanner: scannerViewSchema,
  protocol: protocolViewSchema,
  policy: policyViewSchema,
  requested: keepClearRequestViewSchema.describe('Asked for by a radiologist.').optional(),
  plan: planViewSchema.optional(),
}) satisfies z.ZodType<BenchView>;
