import type { SiteTransaction } from '@/db/client';

export interface QueuedMail {
  readonly id: string;
  readonly messageId: string;
  readonly kind: string;
  /** Null when the person it was for has been disabled meanwhile. */
  readonly address: string | null;
  /** Set for a mail whose address is sealed with a size request. */
  readonly sizeRequest: { readonly id: string; readonly addressSealed: string } | null;
  readonly siteName: string;
  readonly payload: unknown;
  readonly attempts: number;
}

/**
 * The mail, locked until the transaction ends, or null when it is sent, given up, not due yet, or in another worker's
 * hands: a row that is locked is being sent, so it is skipped and not waited for.
 */
export async function takeQueuedMail(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  now: Date,
): Promise<QueuedMail | null> {
  const row = await trx
    .selectFrom('mail_outbox as m')
    .innerJoin('site as s', 's.id', 'm.site_id')
    .leftJoin('app_user as u', (join) =>
      join
        .onRef('u.site_id', '=', 'm.site_id')
        .onRef('u.id', '=', 'm.to_user_id')
        .on('u.disabled_at', 'is', null),
    )
    .leftJoin('size_request as r', (join) => join.onRef('r.site_id', '=', 'm.site_id').onRef('r.id', '=', 'm.to_size_request_id'))
    .where('m.site_id', '=', siteId)
    .where('m.id', '=', id)
    .where('m.status', '=', 'queued')
    .where('m.next_attempt_at', '<=', now)
    .select(['m.id', 'm.message_id', 'm.kind', 'm.to_address', 'u.email', 's.name', 'm.payload', 'm.attempts', 'r.id as request_id', 'r.address_sealed'])
    .forUpdate('m')
    .skipLocked()
    .executeTakeFirst();
  return row
    ? {
        id: row.id,
        messageId: row.message_id,
        kind: row.kind,
        address: row.to_address ?? row.email,
        sizeRequest: row.request_id === null ? null : { id: row.request_id, addressSealed: row.address_sealed ?? '' },
        siteName: row.name,
        payload: row.payload,
        attempts: row.attempts,
      }
    : null;
}
