import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { KeepClear } from '@/lib/domain/case/model';
import { KEEP_CLEAR_PRESETS } from '@/lib/domain/protocol/keep-clear-presets';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { choice, quantity, refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

const KEYS = ['own', ...KEEP_CLEAR_PRESETS.map(({ key }) => key)] as [string, ...string[]];

const shape = {
  keepClearPreset: choice(KEYS, 'Preset that is laid into the patient, or “own” for the box as typed.'),
  keepClear: keepClearSchema,
  toleratedFoldOutsidePct: quantity({
    min: 0, max: 100, unit: 'percent', text: 'Share of the displayed picture that fold beside the area may take',
  }).optional(),
  note: z
    .string({ error: refused('text') })
    .trim()
    .max(500, { error: refused('text of up to 500 characters') })
    .describe('What the exam is about, for whoever plans it; never a name or a date of birth.'),
};

/** What the form on a booking holds. */
export const keepClearRequestForm = strict(shape);
export type KeepClearRequestForm = z.output<typeof keepClearRequestForm>;

export const requestKeepClearInput = strict({ bookingId: idSchema, ...shape });

/** What was asked for, laid into the patient where the sizes are known. */
export interface KeepClearRequestView {
  readonly keepClearPreset: string;
  readonly keepClear: KeepClear;
  /** Left out: site policy says. */
  readonly toleratedFoldOutsidePct?: number;
  readonly note: string;
  readonly by: string;
  readonly at: string;
}

export const keepClearRequestViewSchema = z.strictObject({
  keepClearPreset: z.string(),
  keepClear: keepClearSchema,
  toleratedFoldOutsidePct: z.number().describe('Left out: site policy says.').optional(),
  note: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
}) satisfies z.ZodType<KeepClearRequestView>;
