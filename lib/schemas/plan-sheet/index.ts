import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { PAPERS, SHEET_STATES, type Paper, type SheetState } from '@/lib/domain/plan/sheet';
import { choice, strict } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';

export const requestSheetBody = strict({
  version: expectedVersionSchema.min(1).describe('Version of the plan; left out: the newest.').optional(),
  paper: choice(PAPERS, 'Paper size.').default('A4'),
});
export const requestSheetInput = strict({ planId: idSchema, ...requestSheetBody.shape });

export const sheetParams = z.object({ id: idSchema, sheetId: idSchema });

/** Where the making of a plan sheet stands. */
export interface SheetView {
  readonly id: string;
  readonly planId: string;
  readonly planVersion: number;
  readonly paper: Paper;
  readonly state: SheetState;
  /** Tries that did not end in a file. */
  readonly attempts: number;
  readonly sizeBytes?: number;
}

export const sheetViewSchema = z.strictObject({
  id: z.uuid(),
  planId: z.uuid(),
  planVersion: z.int(),
  paper: z.enum(PAPERS),
  state: z.enum(SHEET_STATES),
  attempts: z.int().describe('Tries that did not end in a file.'),
  sizeBytes: z.int().optional(),
}) satisfies z.ZodType<SheetView>;
