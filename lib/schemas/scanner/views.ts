import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { scannerSchema } from '@/lib/schemas/case/scanner';
import type { ScannerView } from '@/lib/schemas/scanner';

export const scannerViewSchema = z.strictObject({
  id: z.uuid(),
  version: z.int().describe('Each edit makes a new one.'),
  archived: z.boolean(),
  scanner: scannerSchema,
  limitsOwner: z.string(),
  limitsCheckedOn: z.string().describe('YYYY-MM-DD, or empty.'),
  note: z.string(),
  changedAt: z.iso.datetime(),
}) satisfies z.ZodType<ScannerView>;

export const scannerListSchema = z.strictObject({ scanners: z.array(scannerViewSchema) });
