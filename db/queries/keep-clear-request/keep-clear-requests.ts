import type { SiteTransaction } from '@/db/client';
import { readKeepClearRequest, type KeepClearRequest, type KeepClearRequestDocument } from '@/lib/domain/keep-clear-request/document';

/** The newest request for a booking: they are only ever added, so it is the one that counts. */
export async function findKeepClearRequest(trx: SiteTransaction, siteId: string, bookingId: string): Promise<KeepClearRequest | null> {
  const row = await trx
    .selectFrom('keep_clear_request as r')
    .innerJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'r.site_id').onRef('u.id', '=', 'r.requested_by'))
    .select(['r.id', 'r.data', 'r.requested_at', 'u.display_name'])
    .where('r.site_id', '=', siteId)
    .where('r.booking_id', '=', bookingId)
    .orderBy('r.requested_at', 'desc')
    .orderBy('r.id')
    .limit(1)
    .executeTakeFirst();
  if (!row) return null;
  return { id: row.id, document: readKeepClearRequest(row.data), requestedAt: row.requested_at, requestedBy: row.display_name };
}

export async function insertKeepClearRequest(
  trx: SiteTransaction,
  request: {
    readonly siteId: string;
    readonly bookingId: string;
    readonly document: KeepClearRequestDocument;
    readonly requestedBy: string;
    readonly now: Date;
  },
): Promise<void> {
  await trx
    .insertInto('keep_clear_request')
    .values({
      site_id: request.siteId,
      booking_id: request.bookingId,
      data: JSON.stringify(request.document),
      requested_by: request.requestedBy,
      requested_at: request.now,
    })
    .execute();
}
