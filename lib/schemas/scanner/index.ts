import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { refineScanner, scannerShape } from '@/lib/schemas/case/scanner';
import { day, refused, strict } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';
import type { Scanner } from '@/lib/domain/case/model';

const remark = (max: number, text: string) =>
  z.string({ error: refused('text') }).trim().max(max, { error: refused(`text of up to ${max} characters`) }).describe(text);

/** What the scanner form holds; the same for a new scanner and for an edit. */
export const scannerFormSchema = strict({
  scanner: strict(scannerShape, 'The scanner.').superRefine((value, context) =>
    refineScanner(value, (path, message) => context.addIssue({ code: 'custom', path, message })),
  ),
  limitsOwner: remark(120, 'Who answers for the limits.'),
  limitsCheckedOn: z.union([z.literal(''), day('Day the limits were last checked.')]).describe('Day the limits were last checked, or empty.'),
  note: remark(2000, 'Anything the team should know about this scanner.'),
});
export type ScannerForm = z.output<typeof scannerFormSchema>;

export const createScannerInput = scannerFormSchema;
export const editScannerInput = strict({ id: idSchema, expectedVersion: expectedVersionSchema, form: scannerFormSchema });
export const archiveScannerInput = strict({ id: idSchema, expectedVersion: expectedVersionSchema });

export interface ScannerView {
  readonly id: string;
  /** Version of the scanner's data; each edit makes a new one. */
  readonly version: number;
  readonly archived: boolean;
  readonly scanner: Scanner;
  readonly limitsOwner: string;
  readonly limitsCheckedOn: string;
  readonly note: string;
  readonly changedAt: string;
}
