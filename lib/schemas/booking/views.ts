import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { PLAN_STATES } from '@/lib/domain/plan/states';
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
