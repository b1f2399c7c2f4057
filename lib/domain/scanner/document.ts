import type { Scanner } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What is stored for one version of a scanner. Limits are the site's own data, with who answers for them and when. */
export interface ScannerDocument {
  readonly schemaVersion: 1;
  readonly scanner: Scanner;
  readonly limitsOwner: string;
  /** YYYY-MM-DD, or empty. */
  readonly limitsCheckedOn: string;
  readonly note: string;
}

const UPCASTS: Upcasts = {};

export function readScannerDocument(stored: unknown): ScannerDocument {
  return readDocument<ScannerDocument>(stored, 1, UPCASTS);
}

export interface ScannerRecord {
  readonly siteId: string;
  readonly id: string;
  readonly version: number;
  readonly archivedAt: Date | null;
  readonly changedAt: Date;
  readonly document: ScannerDocument;
}
