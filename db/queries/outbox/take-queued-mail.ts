import type { SiteTransaction } from '@/db/client';

export interface QueuedMail {
  readonly id: string;
  readonly messageId: string;
  readonly kind: string;
  /** Null when the person it was for has been disabled meanwhile. */
  readonly address: string | null;
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
    .where('m.site_id', '=', siteId)
    .where('m.id', '=', id)
    .where('m.status', '=', 'queued')
    .where('m.next_attempt_at', '<=', now)
    .select(['m.id', 'm.message_id', 'm.kind', 'm.to_address', 'u.email', 's.name', 'm.payload', 'm.attempts'])
    .forUpdate('m')
    .skipLocked()
    .executeTakeFirst();
  return row
    ? {
        id: row.id,
        messageId: row.message_id,
        kind: row.kind,
        address: row.to_address ?? row.email,
        siteName: row.name,
        payload: row.payload,
        attempts: row.attempts,
      }
    : null;
}
