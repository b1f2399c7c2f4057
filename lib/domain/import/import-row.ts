import type { ReadingSource } from '@/lib/domain/case/model';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';

/** What a file may bring of a size. */
export const IMPORTED_QUANTITIES = [
  'weight-kg', 'height-cm', 'girth-cm', 'hip-girth-cm', 'breadth-mm', 'depth-mm', 'sex', 'arms-position', 'breath-hold-s',
] as const satisfies readonly SizeQuantity[];
export type ImportedQuantity = (typeof IMPORTED_QUANTITIES)[number];

export const IMPORTED_SOURCES = ['measured', 'reported'] as const satisfies readonly ReadingSource[];
export type ImportedSource = (typeof IMPORTED_SOURCES)[number];

export interface ImportedReading {
  readonly quantity: ImportedQuantity;
  readonly value: number;
  readonly source: ImportedSource;
  /** YYYY-MM-DD; absent where the file does not say: then it counts from the day of the import. */
  readonly takenOn?: string;
  /** Where the tape went, for girths. */
  readonly tapeSite?: TapeSite;
}

/** All that ever leaves a file: every field is on this list, and nothing else is read into it. */
export interface ImportRow {
  /** Line of the file, or place in the bundle: for finding it again. */
  readonly number: number;
  readonly accession: string;
  /** ISO 8601 with Z. */
  readonly scheduledAt: string;
  readonly slotMinutes: number;
  readonly scannerId: string;
  readonly protocolId: string;
  readonly readings: readonly ImportedReading[];
}

export const ROW_OUTCOMES = ['created', 'changed', 'same', 'skipped'] as const;
export type RowOutcome = (typeof ROW_OUTCOMES)[number];

/** A row that is left out, and why: the reason names columns and what is allowed, never what stood there. */
export interface SkippedRow {
  readonly number: number;
  readonly reason: string;
}

/** Rows in one piece of staging, so that neither side ever holds a whole file. */
export const ROWS_PER_PIECE = 500;
export const MAX_IMPORT_ROWS = 200_000;
export const SLOT_MINUTES = { min: 5, max: 480 } as const;
