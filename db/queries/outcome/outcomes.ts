import type { SiteTransaction } from '@/db/client';
import { readOutcome, type OutcomeDocument, type OutcomeRecord, type Wrap } from '@/lib/domain/outcome/document';

/** What was recorded of a plan, newest first. */
export async function listOutcomes(trx: SiteTransaction, siteId: string, planId: string): Promise<OutcomeRecord[]> {
  const rows = await trx
    .selectFrom('outcome as o')
    .leftJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'o.site_id').onRef('u.id', '=', 'o.recorded_by'))
    .select(['o.id', 'o.plan_version', 'o.wrap', 'o.data', 'o.recorded_at', 'u.display_name'])
    .where('o.site_id', '=', siteId)
    .where('o.plan_id', '=', planId)
    .orderBy('o.recorded_at', 'desc')
    .orderBy('o.id')
    .execute();
  return rows.map((row) => ({
    id: row.id,
    planVersion: row.plan_version,
    wrap: row.wrap as Wrap,
    document: readOutcome(row.data),
    recordedAt: row.recorded_at,
    recordedBy: row.display_name ?? '',
  }));
}

/** @returns false when an outcome of this id is there already: it was sent twice */
export async function insertOutcome(
  trx: SiteTransaction,
  outcome: {
    readonly siteId: string;
    readonly id: string;
    readonly planId: string;
    readonly planVersion: number;
    readonly wrap: Wrap;
    readonly document: OutcomeDocument;
    readonly recordedBy: string;
    readonly now: Date;
  },
): Promise<boolean> {
  const added = await trx
    .insertInto('outcome')
    .values({
      site_id: outcome.siteId,
      id: outcome.id,
      plan_id: outcome.planId,
      plan_version: outcome.planVersion,
      wrap: outcome.wrap,
      data: JSON.stringify(outcome.document),
      recorded_by: outcome.recordedBy,
      recorded_at: outcome.now,
    })
    .onConflict((conflict) => conflict.doNothing())
    .executeTakeFirst();
  return added.numInsertedOrUpdatedRows === 1n;
}
