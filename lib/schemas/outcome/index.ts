import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { WRAPS, type UsedSequence, type Wrap } from '@/lib/domain/outcome/document';
import { choice, flag, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';

const usedSequence = strict({
  id: words(80, 'The planned sequence.'),
  phase: quantity({
    min: 0, max: 1000, unit: '1', text: 'Phase oversampling as set, in the scanner’s own form; a switch is 0 or 1',
  }),
  slice: quantity({ min: 0, max: 1000, unit: '1', text: 'Slice oversampling as set, in the scanner’s own form' }).optional(),
});

const shape = {
  wrap: choice(WRAPS, 'Wrap seen in the pictures: none, outside the keep-clear area, or inside it.'),
  sequences: z
    .array(usedSequence)
    .min(1, { error: refused('1 to 20 sequences') })
    .max(20, { error: refused('1 to 20 sequences') })
    .describe('Oversampling used, one for each planned sequence that was scanned.'),
  minutes: quantity({ min: 0, max: 480, unit: 'minutes', text: 'Scan time of these sequences' }),
  repeated: flag('Something was scanned again because of fold.'),
  note: z
    .string({ error: refused('text') })
    .trim()
    .max(500, { error: refused('text of up to 500 characters') })
    .describe('What is worth knowing next time; never a name.')
    .default(''),
};

/** What the form on a plan holds. */
export const outcomeForm = strict(shape);
export type OutcomeForm = z.input<typeof outcomeForm>;

/** The caller draws the id, so that the same outcome sent twice is one. */
const identity = { id: idSchema, expectedVersion: expectedVersionSchema };
export const recordOutcomeBody = strict({ ...identity, ...shape });
export const recordOutcomeInput = strict({ planId: idSchema, ...identity, ...shape });

export interface OutcomeView {
  readonly id: string;
  readonly planVersion: number;
  readonly wrap: Wrap;
  readonly sequences: readonly UsedSequence[];
  readonly minutes: number;
  readonly repeated: boolean;
  readonly note: string;
  readonly by: string;
  readonly at: string;
}

export const outcomeViewSchema = z.strictObject({
  id: z.uuid(),
  planVersion: z.int(),
  wrap: z.enum(WRAPS),
  sequences: z.array(
    z.strictObject({
      id: z.string(),
      name: z.string(),
      acquiredLines: z.int(),
      acquiredPartitions: z.int().optional(),
    }),
  ),
  minutes: z.number(),
  repeated: z.boolean(),
  note: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
}) satisfies z.ZodType<OutcomeView>;

export const outcomeListSchema = z.strictObject({ outcomes: z.array(outcomeViewSchema).describe('Newest first.') });
