import type { SiteTransaction } from '@/db/client';

/** A mail that is sent keeps no payload. One that is given up does: it may be sent again, and its payload holds no secret. */
const ERASED = JSON.stringify({ schemaVersion: 1 });

export async function recordSent(trx: SiteTransaction, siteId: string, id: string, now: Date): Promise<void> {
  await trx
    .updateTable('mail_outbox')
    .set((eb) => ({ status: 'sent', sent_at: now, attempts: eb('attempts', '+', 1), last_error: '', payload: ERASED }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** Puts the mail back for `nextAttemptAt`, or gives it up when there is none. */
export async function recordFailure(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  failure: { readonly error: string; readonly nextAttemptAt: Date | null },
): Promise<void> {
  await trx
    .updateTable('mail_outbox')
    .set((eb) => ({
      attempts: eb('attempts', '+', 1),
      last_error: failure.error.slice(0, 500),
      ...(failure.nextAttemptAt ? { next_attempt_at: failure.nextAttemptAt } : { status: 'failed' }),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}
