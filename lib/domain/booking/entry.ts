import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What is written on a booking, by people and by what happens to it. */
export const ENTRY_KINDS = ['note', 'booked', 'move-proposed', 'move-withdrawn', 'move-agreed', 'surgery', 'escalated', 'decided'] as const;
export type EntryKind = (typeof ENTRY_KINDS)[number];

/** A place in the diary, as it was when the line was written. */
export interface EntryPlace {
  readonly scanner: string;
  /** ISO 8601. */
  readonly at: string;
  readonly slotMinutes: number;
}

/** The facts of a line; sizes are never among them. */
export interface EntryDocument {
  readonly schemaVersion: 1;
  readonly from?: EntryPlace;
  readonly to?: EntryPlace;
  /** YYYY-MM-DD, or '' when it was taken back. */
  readonly surgeryOn?: string;
}

const UPCASTS: Upcasts = {};

export function readEntryDocument(stored: unknown): EntryDocument {
  return readDocument<EntryDocument>(stored, 1, UPCASTS);
}

export interface BookingEntry {
  readonly id: string;
  readonly kind: EntryKind;
  readonly note: string;
  readonly data: EntryDocument;
  readonly by: string;
  readonly roles: readonly string[];
  readonly at: Date;
}
