import type { SiteTransaction } from '@/db/client';

export interface ShareRecord {
  readonly siteId: string;
  readonly id: string;
  readonly demonstrationId: string;
  readonly createdAt: Date;
  readonly expiresAt: Date;
  readonly revokedAt: Date | null;
  readonly openings: number;
  readonly lastOpenedAt: Date | null;
}

const COLUMNS = ['site_id', 'id', 'demonstration_id', 'created_at', 'expires_at', 'revoked_at', 'openings', 'last_opened_at'] as const;

/** Everything but the hash. */
function readable(trx: SiteTransaction, siteId: string) {
  return trx.selectFrom('demonstration_share').select(COLUMNS).where('site_id', '=', siteId);
}

function toRecord(row: Awaited<ReturnType<ReturnType<typeof readable>['execute']>>[number]): ShareRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    demonstrationId: row.demonstration_id,
    createdAt: row.created_at,
    expiresAt: row.expires_at,
    revokedAt: row.revoked_at,
    openings: row.openings,
    lastOpenedAt: row.last_opened_at,
  };
}

export async function insertShare(
  trx: SiteTransaction,
  share: { siteId: string; demonstrationId: string; tokenHash: string; expiresAt: Date; createdBy: string },
): Promise<string> {
  const row = await trx
    .insertInto('demonstration_share')
    .values({
      site_id: share.siteId,
      demonstration_id: share.demonstrationId,
      token_hash: share.tokenHash,
      expires_at: share.expiresAt,
      created_by: share.createdBy,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

export async function listShares(trx: SiteTransaction, siteId: string, demonstrationId: string): Promise<ShareRecord[]> {
  const rows = await readable(trx, siteId)
    .where('demonstration_id', '=', demonstrationId)
    .orderBy('created_at', 'desc')
    .orderBy('id')
    .execute();
  return rows.map(toRecord);
}

export async function findShare(trx: SiteTransaction, siteId: string, id: string): Promise<ShareRecord | null> {
  const row = await readable(trx, siteId).where('id', '=', id).executeTakeFirst();
  return row ? toRecord(row) : null;
}

/** @returns false when it was revoked before */
export async function revokeShare(trx: SiteTransaction, siteId: string, id: string, at: Date): Promise<boolean> {
  const result = await trx
    .updateTable('demonstration_share')
    .set({ revoked_at: at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('revoked_at', 'is', null)
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

/** @returns how many worked until now */
export async function revokeAllShares(trx: SiteTransaction, siteId: string, demonstrationId: string, at: Date): Promise<number> {
  const result = await trx
    .updateTable('demonstration_share')
    .set({ revoked_at: at })
    .where('site_id', '=', siteId)
    .where('demonstration_id', '=', demonstrationId)
    .where('revoked_at', 'is', null)
    .executeTakeFirst();
  return Number(result.numUpdatedRows);
}

/** Counts one opening of a link that works at this moment. @returns false when it does not */
export async function countOpening(trx: SiteTransaction, siteId: string, id: string, at: Date): Promise<boolean> {
  const result = await trx
    .updateTable('demonstration_share')
    .set((eb) => ({ openings: eb('openings', '+', 1), last_opened_at: at }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('revoked_at', 'is', null)
    .where('expires_at', '>', at)
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}
