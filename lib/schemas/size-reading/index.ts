import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { Patient, ReadingSource } from '@/lib/domain/case/model';
import { QUANTITIES, QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';
import { READING_SOURCES } from '@/lib/schemas/case/patient';
import { choice, day, quantity, refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

/** One number about the patient as it is written down. */
export const sizeReadingInput = strict({
  id: idSchema.describe('Drawn by the sender, so that the same reading sent twice is one; left out: drawn here.').optional(),
  quantity: choice(QUANTITIES, 'What was measured; its unit is part of the name.'),
  value: quantity({ min: 0, max: 3000, unit: '1', text: 'Value in the unit of the quantity' }),
  source: choice(READING_SOURCES, 'How the value was got.'),
  spread: quantity({ min: 0, max: 500, unit: '1', text: 'One standard deviation, same unit as the value' }),
  takenOn: day('Day the value was taken, YYYY-MM-DD.'),
}).superRefine((value, context) => {
  const facts = QUANTITY_FACTS[value.quantity];
  if (value.value < facts.min || value.value > facts.max) {
    context.addIssue({
      code: 'custom', path: ['value'],
      message: `${value.value} given; allowed for ${facts.label}: ${facts.min} to ${facts.max} ${facts.unit}`,
    });
  }
});

const readingList = {
  readings: z
    .array(sizeReadingInput)
    .min(1, { error: refused('1 to 40 readings') })
    .max(40, { error: refused('1 to 40 readings') })
    .describe('Readings to add; earlier ones stay.'),
};
export const addReadingsBody = strict(readingList);
export const recordReadingsInput = strict({ bookingId: idSchema, ...readingList });
export type RecordReadings = z.output<typeof recordReadingsInput>;

export interface SizeReadingView {
  readonly id: string;
  readonly quantity: SizeQuantity;
  readonly value: number;
  readonly unit: string;
  readonly source: ReadingSource;
  readonly spread: number;
  readonly takenOn: string;
  /** Where a girth's tape went, as far as it was said. */
  readonly tapeSite?: TapeSite;
  readonly recordedAt: string;
  /** Older than the policy's days. */
  readonly expired: boolean;
}

/** The size record of a booking: what the engine takes, what it rests on, and what is missing. */
export interface SizeRecordView {
  readonly readings: readonly SizeReadingView[];
  /** Absent while the sizes needed are missing. */
  readonly patient?: Patient;
  readonly missing: readonly string[];
  /** Sentences about readings that do not agree, have expired or are extrapolated. */
  readonly remarks: readonly string[];
}
