import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { EntryDocument, EntryKind } from '@/lib/domain/booking/entry';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';
import { refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

const error = refused('text of 1 to 2000 characters');
export const noteField = z
  .string({ error }).trim().min(1, { error }).max(2000, { error })
  .regex(/^[^\p{Cc}]*(?:[\n\t][^\p{Cc}]*)*$/u, { error: refused('text without control characters') })
  .describe('Note: no name, no date of birth.');

export const addNoteInput = strict({ bookingId: idSchema, note: noteField });
export type AddNote = z.output<typeof addNoteInput>;

/** One line of a booking's history, newest first. */
export interface HistoryLine {
  readonly id: string;
  readonly at: string;
  readonly kind: EntryKind | 'result' | 'sizes' | 'added';
  readonly by?: string;
  readonly roles?: readonly string[];
  readonly note?: string;
  readonly data?: EntryDocument;
  readonly result?: PreCheckResult;
  /** Labels of the sizes that were recorded; never their values. */
  readonly sizes?: readonly string[];
}
