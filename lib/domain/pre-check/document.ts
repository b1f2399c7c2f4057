import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';
import type { PreCheck } from './result';

/** What is stored of one check. */
export interface PreCheckDocument extends PreCheck {
  readonly schemaVersion: 1;
}

const UPCASTS: Upcasts = {};

export function readPreCheckDocument(stored: unknown): PreCheckDocument {
  return readDocument<PreCheckDocument>(stored, 1, UPCASTS);
}
