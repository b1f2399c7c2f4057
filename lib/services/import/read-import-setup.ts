import type { SiteTransaction } from '@/db/client';
import { listProtocols } from '@/db/queries/protocol/protocols';
import { listScanners } from '@/db/queries/scanner/scanners';
import { findSite } from '@/db/queries/site/sites';
import { ServiceError } from '@/lib/domain/errors';

interface Named {
  readonly id: string;
  readonly name: string;
}

export interface ImportSetup {
  readonly mask: string;
  readonly scanners: readonly Named[];
  readonly protocols: readonly Named[];
}

/** What rows of a file are held against: the accession mask and the scanners and protocols in use. */
export async function readImportSetup(trx: SiteTransaction, siteId: string): Promise<ImportSetup> {
  const site = await findSite(trx, siteId);
  if (!site) throw new ServiceError('not-found');
  const scanners = await listScanners(trx, siteId, { includeArchived: false });
  const protocols = await listProtocols(trx, siteId, { includeArchived: false });
  return {
    mask: site.accessionMask,
    scanners: scanners.map(({ id, document }) => ({ id, name: document.scanner.name })),
    protocols: protocols.map(({ id, document }) => ({ id, name: document.name })),
  };
}
