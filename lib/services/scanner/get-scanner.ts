import { inTransaction } from '@/db/client';
import { findScanner } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import type { ScannerView } from '@/lib/schemas/scanner';
import type { ServiceContext } from '../context';
import { toScannerView } from './to-scanner-view';

/** One scanner, in its newest version unless another is named. */
export async function getScanner(
  { actor }: ServiceContext,
  input: { readonly id: string; readonly version?: number },
): Promise<ScannerView> {
  const record = await inTransaction(actor.siteId, (trx) => findScanner(trx, actor.siteId, input.id, input.version));
  authorise(actor, 'scanner.read', record);
  return toScannerView(record);
}
