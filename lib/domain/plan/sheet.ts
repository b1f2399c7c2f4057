export const PAPERS = ['A4', 'Letter'] as const;
export type Paper = (typeof PAPERS)[number];

export const SHEET_STATES = ['queued', 'done', 'failed'] as const;
export type SheetState = (typeof SHEET_STATES)[number];

/** A page of text and lines stays far below; the table refuses more. */
export const SHEET_MAX_BYTES = 1_048_576;

/** A plan sheet as a file, or the place where it will be. */
export interface SheetRecord {
  readonly siteId: string;
  readonly id: string;
  readonly planId: string;
  readonly planVersion: number;
  readonly paper: Paper;
  readonly contentHash: string;
  readonly state: SheetState;
  readonly attempts: number;
  readonly sizeBytes: number | null;
}
