import type { ProtocolDocument, ProtocolRecord, SequenceDocument } from '@/lib/domain/protocol/document';
import type { ProtocolForm, ProtocolListItem, ProtocolView } from '@/lib/schemas/protocol';

export function toProtocolView(record: ProtocolRecord): ProtocolView {
  const { name, region, keepClearPreset, keepClear } = record.document;
  return {
    id: record.id,
    version: record.version,
    archived: record.archivedAt !== null,
    name,
    region,
    keepClearPreset,
    keepClear,
    sequences: record.sequences,
    changedAt: record.changedAt.toISOString(),
  };
}

export function toProtocolListItem(record: ProtocolRecord): ProtocolListItem {
  return {
    id: record.id,
    version: record.version,
    archived: record.archivedAt !== null,
    name: record.document.name,
    region: record.document.region,
    sequenceCount: record.sequences.length,
    changedAt: record.changedAt.toISOString(),
  };
}

/** The form split as it is stored: the protocol's own document and one a sequence. */
export function toProtocolDocuments(form: ProtocolForm): { document: ProtocolDocument; sequences: SequenceDocument[] } {
  const { sequences, ...document } = form;
  return {
    document: { schemaVersion: 1, ...document },
    sequences: sequences.map((prescription) => ({ schemaVersion: 1, prescription })),
  };
}
