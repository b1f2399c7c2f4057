import type { ScannerRecord } from '@/lib/domain/scanner/document';
import type { ScannerView } from '@/lib/schemas/scanner';

export function toScannerView(record: ScannerRecord): ScannerView {
  const { scanner, limitsOwner, limitsCheckedOn, note } = record.document;
  return {
    id: record.id,
    version: record.version,
    archived: record.archivedAt !== null,
    scanner,
    limitsOwner,
    limitsCheckedOn,
    note,
    changedAt: record.changedAt.toISOString(),
  };
}
