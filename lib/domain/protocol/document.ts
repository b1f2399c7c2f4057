import type { BodyRegion, KeepClear, Prescription } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What is stored for one version of a protocol, beside its sequences. */
export interface ProtocolDocument {
  readonly schemaVersion: 1;
  readonly name: string;
  readonly region: BodyRegion;
  readonly keepClearPreset: string;
  readonly keepClear: KeepClear;
}

export interface SequenceDocument {
  readonly schemaVersion: 1;
  readonly prescription: Prescription;
}

const PROTOCOL_UPCASTS: Upcasts = {};
const SEQUENCE_UPCASTS: Upcasts = {};

export function readProtocolDocument(stored: unknown): ProtocolDocument {
  return readDocument<ProtocolDocument>(stored, 1, PROTOCOL_UPCASTS);
}

export function readSequenceDocument(stored: unknown): SequenceDocument {
  return readDocument<SequenceDocument>(stored, 1, SEQUENCE_UPCASTS);
}

export interface SequenceRecord {
  readonly id: string;
  readonly position: number;
  readonly prescription: Prescription;
}

export interface ProtocolRecord {
  readonly siteId: string;
  readonly id: string;
  readonly version: number;
  readonly archivedAt: Date | null;
  readonly changedAt: Date;
  readonly document: ProtocolDocument;
  readonly sequences: readonly SequenceRecord[];
}
