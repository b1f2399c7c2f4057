import type { SiteTransaction } from '@/db/client';

export interface OutboxRow {
  readonly id: string;
  readonly kind: string;
  readonly status: 'queued' | 'sent' | 'failed';
  readonly attempts: number;
  readonly createdAt: Date;
  readonly nextAttemptAt: Date;
  readonly sentAt: Date | null;
  readonly lastError: string;
  readonly payload: unknown;
  /** Name of the person it is for; null for whoever a size request is for. */
  readonly person: string | null;
  readonly sizeRequest: { readonly bookingId: string; readonly accession: string; readonly open: boolean; readonly addressMasked: string } | null;
}

function outboxRows(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('mail_outbox as m')
    .leftJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'm.site_id').onRef('u.id', '=', 'm.to_user_id'))
    .leftJoin('size_request as r', (join) => join.onRef('r.site_id', '=', 'm.site_id').onRef('r.id', '=', 'm.to_size_request_id'))
    .leftJoin('booking as b', (join) => join.onRef('b.site_id', '=', 'r.site_id').onRef('b.id', '=', 'r.booking_id'))
    .select([
      'm.id', 'm.kind', 'm.status', 'm.attempts', 'm.created_at', 'm.next_attempt_at', 'm.sent_at', 'm.last_error', 'm.payload',
      'u.display_name', 'r.booking_id', 'r.status as request_status', 'r.address_masked', 'b.accession',
    ])
    .where('m.site_id', '=', siteId);
}

type Selected = Awaited<ReturnType<ReturnType<typeof outboxRows>['executeTakeFirstOrThrow']>>;

const toRow = (row: Selected): OutboxRow => ({
  id: row.id,
  kind: row.kind,
  status: row.status as OutboxRow['status'],
  attempts: row.attempts,
  createdAt: row.created_at,
  nextAttemptAt: row.next_attempt_at,
  sentAt: row.sent_at,
  lastError: row.last_error,
  payload: row.payload,
  person: row.display_name,
  sizeRequest: row.booking_id === null
    ? null
    : { bookingId: row.booking_id, accession: row.accession ?? '', open: row.request_status === 'open', addressMasked: row.address_masked ?? '' },
});

/** Mails of one state, newest first. */
export async function listMail(trx: SiteTransaction, siteId: string, status: OutboxRow['status'], limit: number): Promise<OutboxRow[]> {
  const rows = await outboxRows(trx, siteId).where('m.status', '=', status).orderBy('m.created_at', 'desc').orderBy('m.id').limit(limit).execute();
  return rows.map(toRow);
}

/** One mail, locked until the transaction ends. */
export async function lockMail(trx: SiteTransaction, siteId: string, id: string): Promise<(OutboxRow & { readonly siteId: string }) | null> {
  const row = await outboxRows(trx, siteId).where('m.id', '=', id).forUpdate('m').executeTakeFirst();
  return row ? { ...toRow(row), siteId } : null;
}

/** Due at once, with all its tries before it; the message stays the one it was. */
export async function queueAgain(trx: SiteTransaction, siteId: string, id: string, now: Date): Promise<void> {
  await trx
    .updateTable('mail_outbox')
    .set({ status: 'queued', attempts: 0, next_attempt_at: now })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

export async function countFailedMail(trx: SiteTransaction, siteId: string): Promise<number> {
  const { total } = await trx
    .selectFrom('mail_outbox')
    .select((eb) => eb.fn.countAll<string>().as('total'))
    .where('site_id', '=', siteId)
    .where('status', '=', 'failed')
    .executeTakeFirstOrThrow();
  return Number(total);
}
