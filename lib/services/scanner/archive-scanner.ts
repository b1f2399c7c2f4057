import { inTransaction } from '@/db/client';
import { findScanner, setScannerArchived } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import { staleVersion } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { archiveScannerInput, type ScannerView } from '@/lib/schemas/scanner';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { setupChanged } from '../pre-check/mark-changed';
import { toScannerView } from './to-scanner-view';

async function setArchived(context: ServiceContext, input: unknown, archived: boolean): Promise<ScannerView> {
  const { actor } = context;
  authorise(actor, 'scanner.edit');
  const { id, expectedVersion } = parseInput(archiveScannerInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const before = await findScanner(trx, siteId, id);
    authorise(actor, 'scanner.edit', before);
    if ((before.archivedAt !== null) === archived) return toScannerView(before);
    const changed = await setScannerArchived(trx, siteId, id, expectedVersion, archived ? nowOf(context) : null);
    const after = await findScanner(trx, siteId, id);
    authorise(actor, 'scanner.edit', after);
    if (!changed) throw staleVersion(after.version);
    await recordAudit(trx, context, {
      action: 'scanner.edit', subjectType: 'scanner', subjectId: id, fields: [archived ? 'archived' : 'restored'],
    });
    await setupChanged(trx, siteId, {}, nowOf(context));
    return toScannerView(after);
  });
}

/** Takes a scanner out of lists and new bookings; what was booked and planned on it stays. */
export function archiveScanner(context: ServiceContext, input: unknown): Promise<ScannerView> {
  return setArchived(context, input, true);
}

export function restoreScanner(context: ServiceContext, input: unknown): Promise<ScannerView> {
  return setArchived(context, input, false);
}
