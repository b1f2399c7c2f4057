import type { SiteTransaction } from '@/db/client';
import { readScannerDocument, type ScannerDocument, type ScannerRecord } from '@/lib/domain/scanner/document';

function current(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('scanner as s')
    .innerJoin('scanner_version as v', (join) =>
      join.onRef('v.site_id', '=', 's.site_id').onRef('v.scanner_id', '=', 's.id'),
    )
    .select(['s.site_id', 's.id', 's.archived_at', 'v.version', 'v.data', 'v.created_at'])
    .where('s.site_id', '=', siteId);
}

type ScannerRow = Awaited<ReturnType<ReturnType<typeof current>['execute']>>[number];

function toScanner(row: ScannerRow): ScannerRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    version: row.version,
    archivedAt: row.archived_at,
    changedAt: row.created_at,
    document: readScannerDocument(row.data),
  };
}

/** Newest version of every scanner, by name; archived ones only when asked for. */
export async function listScanners(
  trx: SiteTransaction,
  siteId: string,
  options: { readonly includeArchived: boolean },
): Promise<ScannerRecord[]> {
  let query = current(trx, siteId).whereRef('v.version', '=', 's.current_version').orderBy('s.name').orderBy('s.id');
  if (!options.includeArchived) query = query.where('s.archived_at', 'is', null);
  return (await query.execute()).map(toScanner);
}

/** One version of a scanner, the newest unless said otherwise. */
export async function findScanner(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  version?: number,
): Promise<ScannerRecord | null> {
  const query = current(trx, siteId).where('s.id', '=', id);
  const row = await (version === undefined
    ? query.whereRef('v.version', '=', 's.current_version')
    : query.where('v.version', '=', version)
  ).executeTakeFirst();
  return row ? toScanner(row) : null;
}

export async function scannerNameTaken(trx: SiteTransaction, siteId: string, name: string, exceptId?: string): Promise<boolean> {
  let query = trx.selectFrom('scanner').select('id').where('site_id', '=', siteId).where('name', '=', name);
  if (exceptId) query = query.where('id', '<>', exceptId);
  return (await query.executeTakeFirst()) !== undefined;
}

interface NewVersion {
  readonly siteId: string;
  readonly id: string;
  readonly version: number;
  readonly document: ScannerDocument;
  readonly createdBy: string;
}

async function insertVersion(trx: SiteTransaction, next: NewVersion): Promise<void> {
  await trx
    .insertInto('scanner_version')
    .values({
      site_id: next.siteId,
      scanner_id: next.id,
      version: next.version,
      data: JSON.stringify(next.document),
      created_by: next.createdBy,
    })
    .execute();
}

export async function insertScanner(
  trx: SiteTransaction,
  scanner: { readonly siteId: string; readonly id?: string; readonly document: ScannerDocument; readonly createdBy: string },
): Promise<string> {
  const { siteId, document, createdBy } = scanner;
  const { id } = await trx
    .insertInto('scanner')
    .values({ site_id: siteId, name: document.scanner.name, ...(scanner.id ? { id: scanner.id } : {}) })
    .returning('id')
    .executeTakeFirstOrThrow();
  await insertVersion(trx, { siteId, id, version: 1, document, createdBy });
  return id;
}

/** Adds the version after `expectedVersion`. @returns false when that is not the newest any more */
export async function addScannerVersion(
  trx: SiteTransaction,
  change: Omit<NewVersion, 'version'> & { readonly expectedVersion: number },
): Promise<boolean> {
  const { siteId, id, document, createdBy, expectedVersion } = change;
  const moved = await trx
    .updateTable('scanner')
    .set({ name: document.scanner.name, current_version: expectedVersion + 1 })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('current_version', '=', expectedVersion)
    .executeTakeFirst();
  if (moved.numUpdatedRows !== 1n) return false;
  await insertVersion(trx, { siteId, id, version: expectedVersion + 1, document, createdBy });
  return true;
}

/** @returns false when the version is stale or the state is there already */
export async function setScannerArchived(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  expectedVersion: number,
  archivedAt: Date | null,
): Promise<boolean> {
  const changed = await trx
    .updateTable('scanner')
    .set({ archived_at: archivedAt })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('current_version', '=', expectedVersion)
    .where('archived_at', archivedAt === null ? 'is not' : 'is', null)
    .executeTakeFirst();
  return changed.numUpdatedRows === 1n;
}
