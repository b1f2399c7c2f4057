import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { REGIONS } from '@/lib/schemas/case/patient';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import type { ProtocolListItem, ProtocolView } from '@/lib/schemas/protocol';

const head = {
  id: z.uuid(),
  version: z.int().describe('Each edit makes a new one.'),
  archived: z.boolean(),
  name: z.string(),
  region: z.enum(REGIONS),
  changedAt: z.iso.datetime(),
};

export const protocolListItemSchema = z.strictObject({
  ...head,
  sequenceCount: z.int(),
}) satisfies z.ZodType<ProtocolListItem>;

export const protocolViewSchema = z.strictObject({
  ...head,
  keepClearPreset: z.string(),
  keepClear: keepClearSchema,
  sequences: z.array(z.strictObject({ id: z.uuid(), position: z.int(), prescription: prescriptionSchema })),
}) satisfies z.ZodType<ProtocolView>;

export const protocolListSchema = z.strictObject({ protocols: z.array(protocolListItemSchema) });
