import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { QUANTITIES } from '@/lib/domain/size-reading/quantities';
import { TAPE_SITES } from '@/lib/domain/size-reading/tape-site';
import { patientSchema, READING_SOURCES } from '@/lib/schemas/case/patient';
import type { SizeReadingView, SizeRecordView } from '@/lib/schemas/size-reading';

export const sizeReadingViewSchema = z.strictObject({
  id: z.uuid(),
  quantity: z.enum(QUANTITIES),
  value: z.number(),
  unit: z.string(),
  source: z.enum(READING_SOURCES),
  spread: z.number(),
  takenOn: z.iso.date(),
  tapeSite: z.enum(TAPE_SITES).describe('Where a girth’s tape went.').optional(),
  recordedAt: z.iso.datetime(),
  expired: z.boolean(),
}) satisfies z.ZodType<SizeReadingView>;

export const sizeRecordSchema = z.strictObject({
  readings: z.array(sizeReadingViewSchema).describe('Newest first.'),
  patient: patientSchema.describe('Left out while a size that is needed is missing.').optional(),
  missing: z.array(z.string()),
  remarks: z.array(z.string()),
}) satisfies z.ZodType<SizeRecordView>;
