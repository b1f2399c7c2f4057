import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { ImportSettings } from '@/lib/domain/import';

export interface ImportBatch {
  readonly siteId: string;
  readonly id: string;
  readonly format: 'csv' | 'fhir';
  readonly status: 'staging' | 'committed' | 'cancelled';
  readonly created: number;
  readonly changed: number;
  readonly same: number;
}

/** @returns false when the id is in use already */
export async function insertImportBatch(
  trx: SiteTransaction,
  batch: { readonly siteId: string; readonly id: string; readonly format: string; readonly createdBy: string },
): Promise<boolean> {
  const row = await trx
    .insertInto('import_batch')
    .values({ site_id: batch.siteId, id: batch.id, format: batch.format, created_by: batch.createdBy })
    .onConflict((conflict) => conflict.columns(['site_id', 'id']).doNothing())
    .returning('id')
    .executeTakeFirst();
  return row !== undefined;
}

/** The batch, held against others until the transaction ends: pieces and commits of one import follow each other. */
export async function lockImportBatch(trx: SiteTransaction, siteId: string, id: string): Promise<ImportBatch | null> {
  const row = await trx
    .selectFrom('import_batch')
    .select(['site_id', 'id', 'format', 'status', 'created_count', 'changed_count', 'same_count'])
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst();
  return row
    ? {
        siteId: row.site_id,
        id: row.id,
        format: row.format as ImportBatch['format'],
        status: row.status as ImportBatch['status'],
        created: row.created_count,
        changed: row.changed_count,
        same: row.same_count,
      }
    : null;
}

export async function closeImportBatch(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  done: { readonly status: 'committed' | 'cancelled'; readonly created: number; readonly changed: number; readonly same: number; readonly at: Date },
): Promise<void> {
  await trx
    .updateTable('import_batch')
    .set({ status: done.status, created_count: done.created, changed_count: done.changed, same_count: done.same, committed_at: done.at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/**
 * Erases the rows of imports that are committed or stopped, and of those that nobody has come back to for a day. The
 * database lets no other row go. @returns how many
 */
export async function eraseStagedRows(trx: SiteTransaction, siteId: string): Promise<number> {
  const { numAffectedRows } = await sql`
    delete from import_row i using import_batch b
    where i.site_id = ${siteId} and b.site_id = i.site_id and b.id = i.batch_id
      and (b.status <> 'staging' or b.created_at < now() - interval '1 day')`.execute(trx);
  return Number(numAffectedRows ?? 0n);
}

/** How this site's files are read, as stored; null before the first import. */
export async function findImportSettings(trx: SiteTransaction, siteId: string): Promise<unknown> {
  const row = await trx.selectFrom('import_settings').select('data').where('site_id', '=', siteId).executeTakeFirst();
  return row?.data ?? null;
}

export async function saveImportSettings(
  trx: SiteTransaction,
  siteId: string,
  settings: ImportSettings,
  saved: { readonly by: string; readonly at: Date },
): Promise<void> {
  const values = { data: JSON.stringify(settings), saved_by: saved.by, saved_at: saved.at };
  await trx
    .insertInto('import_settings')
    .values({ site_id: siteId, ...values })
    .onConflict((conflict) => conflict.column('site_id').doUpdateSet(values))
    .execute();
}
