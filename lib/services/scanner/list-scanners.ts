import { inTransaction } from '@/db/client';
import { listScanners as readScanners } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import type { ScannerView } from '@/lib/schemas/scanner';
import type { ServiceContext } from '../context';
import { toScannerView } from './to-scanner-view';

/** The site's scanners by name; archived ones only when asked for. */
export async function listScanners(
  { actor }: ServiceContext,
  options: { readonly includeArchived?: boolean } = {},
): Promise<ScannerView[]> {
  authorise(actor, 'scanner.read');
  const records = await inTransaction(actor.siteId, (trx) =>
    readScanners(trx, actor.siteId, { includeArchived: options.includeArchived ?? false }),
  );
  return records.map(toScannerView);
}
