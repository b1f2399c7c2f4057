import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import {
  IMPORT_FIELDS, IMPORTED_QUANTITIES, IMPORTED_SOURCES, LENGTH_UNITS, MASS_UNITS, MAX_IMPORT_ROWS, ROW_OUTCOMES,
  ROWS_PER_PIECE, SIZE_FIELDS, SLOT_MINUTES, type RowOutcome,
} from '@/lib/domain/import';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { TAPE_SITES } from '@/lib/domain/size-reading/tape-site';
import { choice, count, day, moment, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

const importedReading = strict({
  quantity: choice(IMPORTED_QUANTITIES, 'What was measured; its unit is part of the name.'),
  value: quantity({ min: 0, max: 3000, unit: '1', text: 'Value in the unit of the quantity' }),
  source: choice(IMPORTED_SOURCES, 'How the value was got.'),
  takenOn: day('Day the value was taken, YYYY-MM-DD.').optional(),
  tapeSite: choice(TAPE_SITES, 'Where the tape went.').optional(),
}).superRefine(({ quantity: what, value }, context) => {
  const { min, max, unit, label } = QUANTITY_FACTS[what];
  if (value < min || value > max) context.addIssue({ code: 'custom', path: ['value'], message: `allowed for ${label}: ${min} to ${max} ${unit}` });
});

const importRow = strict({
  number: count({ min: 1, max: 10_000_000, text: 'Line of the file' }),
  accession: words(64, 'Accession or request number exactly as the worklist shows it; never a name or a date.'),
  scheduledAt: moment('Start of the slot.'),
  slotMinutes: count({ ...SLOT_MINUTES, unit: 'minutes', text: 'Length of the slot' }),
  scannerId: idSchema.describe('Booked scanner.'),
  protocolId: idSchema.describe('Booked protocol.'),
  readings: z.array(importedReading).max(IMPORTED_QUANTITIES.length, { error: refused(`up to ${IMPORTED_QUANTITIES.length} sizes`) }).describe('Sizes.'),
});

const nameIds = z.record(z.string().max(120), z.union([idSchema, z.literal('')]))
  .refine((names) => Object.keys(names).length <= 500, { error: 'allowed: up to 500 names' });
const column = words(120, 'Title of the column, or its place.');

/** Which column is what. Only titles of mapped columns are in it. */
export const importSettingsSchema = strict({
  schemaVersion: z.literal(1),
  columns: z.partialRecord(z.enum(IMPORT_FIELDS), column).describe('Columns by field.'),
  units: z.partialRecord(z.enum(SIZE_FIELDS), z.enum([...LENGTH_UNITS, ...MASS_UNITS])).describe('Units by field.'),
  dateOrder: choice(['day-first', 'month-first'], 'Order of days written with the year last.'),
  source: choice(IMPORTED_SOURCES, 'How the sizes of the file were got.'),
  scanners: nameIds.describe('Names of scanners.'),
  protocols: nameIds.describe('Names of protocols.'),
});

export const startImportInput = strict({
  id: idSchema.describe('Drawn by the sender: the same import started twice is one.'),
  format: choice(['csv', 'fhir'], 'What the file was.'),
  settings: importSettingsSchema.describe('Kept for the next file.').optional(),
});
export type StartImport = z.output<typeof startImportInput>;

const rowsShape = {
  rows: z.array(importRow).min(1, { error: refused('rows') }).max(ROWS_PER_PIECE, { error: refused(`up to ${ROWS_PER_PIECE} rows in one piece`) }).describe('Rows, in the order of the file.'),
};
export const stageRowsBody = strict(rowsShape);
export const stageRowsInput = strict({ importId: idSchema, ...rowsShape });
export type StageRows = z.output<typeof stageRowsInput>;

const commitShape = {
  expectedRows: count({ min: 0, max: MAX_IMPORT_ROWS, text: 'Rows that were staged; another number there and nothing is done' }),
};
export const commitImportBody = strict(commitShape);
export const commitImportInput = strict({ importId: idSchema, ...commitShape });

export interface StagedRow {
  readonly number: number;
  readonly outcome: RowOutcome;
  /** Names of what changes, or why the row is left out. */
  readonly note: string;
}
export interface StagedRows {
  readonly rows: readonly StagedRow[];
}
export interface ImportStarted {
  readonly id: string;
}
export interface ImportDone {
  readonly id: string;
  readonly created: number;
  readonly changed: number;
  readonly same: number;
}
export interface BundleDone extends ImportDone {
  readonly skipped: readonly { readonly number: number; readonly reason: string }[];
}

const counts = { id: z.uuid(), created: z.int(), changed: z.int(), same: z.int() };
export const importStartedSchema = z.strictObject({ id: z.uuid() }) satisfies z.ZodType<ImportStarted>;
export const stagedRowsSchema = z.strictObject({
  rows: z.array(z.strictObject({ number: z.int(), outcome: z.enum(ROW_OUTCOMES), note: z.string() })),
}) satisfies z.ZodType<StagedRows>;
export const importDoneSchema = z.strictObject(counts) satisfies z.ZodType<ImportDone>;
export const bundleDoneSchema = z.strictObject({
  ...counts,
  skipped: z.array(z.strictObject({ number: z.int().describe('Place in the bundle, from 1.'), reason: z.string() })),
}) satisfies z.ZodType<BundleDone>;
