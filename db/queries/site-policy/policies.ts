import type { SiteTransaction } from '@/db/client';
import { readPolicyDocument, type PolicyDocument, type PolicyRecord } from '@/lib/domain/site-policy/document';

/** One version of the policy, the newest unless said otherwise; null for a site that has none yet. */
export async function findPolicy(trx: SiteTransaction, siteId: string, version?: number): Promise<PolicyRecord | null> {
  let query = trx
    .selectFrom('site_policy')
    .select(['site_id', 'version', 'data', 'created_at'])
    .where('site_id', '=', siteId)
    .orderBy('version', 'desc')
    .limit(1);
  if (version !== undefined) query = query.where('version', '=', version);
  const row = await query.executeTakeFirst();
  if (!row) return null;
  const { policy, pathway } = readPolicyDocument(row.data);
  return {
    siteId: row.site_id,
    version: row.version,
    changedAt: row.created_at,
    // The row's number is the one that counts, whatever the document was written with.
    policy: { ...policy, version: row.version },
    pathway,
  };
}

/** Adds a version. @returns false when someone else added it first */
export async function addPolicyVersion(
  trx: SiteTransaction,
  next: { readonly siteId: string; readonly version: number; readonly document: PolicyDocument; readonly createdBy: string },
): Promise<boolean> {
  const added = await trx
    .insertInto('site_policy')
    .values({
      site_id: next.siteId,
      version: next.version,
      data: JSON.stringify(next.document),
      created_by: next.createdBy,
    })
    .onConflict((conflict) => conflict.columns(['site_id', 'version']).doNothing())
    .executeTakeFirst();
  return added.numInsertedOrUpdatedRows === 1n;
}
