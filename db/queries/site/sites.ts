import type { SiteTransaction } from '@/db/client';
import type { SiteRecord } from '@/lib/domain/site/site';

export async function findSite(trx: SiteTransaction, siteId: string): Promise<SiteRecord | null> {
  const row = await trx
    .selectFrom('site')
    .select(['id', 'name', 'accession_pattern'])
    .where('id', '=', siteId)
    .executeTakeFirst();
  return row ? { siteId: row.id, name: row.name, accessionMask: row.accession_pattern } : null;
}

export async function updateSite(
  trx: SiteTransaction,
  siteId: string,
  change: { readonly name: string; readonly accessionMask: string },
): Promise<void> {
  await trx
    .updateTable('site')
    .set({ name: change.name, accession_pattern: change.accessionMask })
    .where('id', '=', siteId)
    .execute();
}
