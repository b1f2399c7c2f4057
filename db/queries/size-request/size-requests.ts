import type { SiteTransaction } from '@/db/client';
import type { SizeRequestRecord, SizeRequestStatus } from '@/lib/domain/size-request/size-request';

const COLUMNS = [
  'site_id', 'id', 'booking_id', 'status', 'address_sealed', 'address_masked', 'expires_at', 'asked_at', 'sent_count', 'last_sent_at', 'settled_at',
] as const;

function requests(trx: SiteTransaction, siteId: string) {
  return trx.selectFrom('size_request').select(COLUMNS).where('site_id', '=', siteId);
}
type Row = Awaited<ReturnType<ReturnType<typeof requests>['execute']>>[number];

const toRecord = (row: Row): SizeRequestRecord => ({
  siteId: row.site_id,
  id: row.id,
  bookingId: row.booking_id,
  status: row.status as SizeRequestStatus,
  addressSealed: row.address_sealed,
  addressMasked: row.address_masked,
  expiresAt: row.expires_at,
  askedAt: row.asked_at,
  sentCount: row.sent_count,
  lastSentAt: row.last_sent_at,
  settledAt: row.settled_at,
});

export async function insertSizeRequest(
  trx: SiteTransaction,
  request: {
    readonly siteId: string; readonly id: string; readonly bookingId: string; readonly tokenHash: string;
    readonly expiresAt: Date; readonly askedBy: string; readonly askedAt: Date;
  },
): Promise<void> {
  await trx
    .insertInto('size_request')
    .values({
      site_id: request.siteId, id: request.id, booking_id: request.bookingId, token_hash: request.tokenHash,
      expires_at: request.expiresAt, asked_by: request.askedBy, asked_at: request.askedAt,
    })
    .execute();
}

export async function findSizeRequest(trx: SiteTransaction, siteId: string, id: string): Promise<SizeRequestRecord | null> {
  const row = await requests(trx, siteId).where('id', '=', id).executeTakeFirst();
  return row ? toRecord(row) : null;
}

/** The request, held until the transaction ends: of two answers at once the second sees the first. */
export async function lockSizeRequest(trx: SiteTransaction, siteId: string, id: string): Promise<SizeRequestRecord | null> {
  const row = await requests(trx, siteId).where('id', '=', id).forUpdate().executeTakeFirst();
  return row ? toRecord(row) : null;
}

export interface ListedRequest extends SizeRequestRecord {
  readonly mailStatus: string | null;
  readonly mailError: string | null;
}

/** Newest first, each with how its last mail fared. */
export async function listSizeRequests(trx: SiteTransaction, siteId: string, bookingId: string): Promise<ListedRequest[]> {
  const rows = await requests(trx, siteId)
    .leftJoinLateral(
      (from) =>
        from
          .selectFrom('mail_outbox as m')
          .select(['m.status as mail_status', 'm.last_error as mail_error'])
          .whereRef('m.site_id', '=', 'size_request.site_id')
          .whereRef('m.to_size_request_id', '=', 'size_request.id')
          .orderBy('m.created_at', 'desc')
          .limit(1)
          .as('n'),
      (join) => join.onTrue(),
    )
    .select(['n.mail_status', 'n.mail_error'])
    .where('booking_id', '=', bookingId)
    .orderBy('asked_at', 'desc')
    .orderBy('id')
    .limit(20)
    .execute();
  return rows.map((row) => ({ ...toRecord(row), mailStatus: row.mail_status, mailError: row.mail_error }));
}

/** One more mail is on its way; a new address takes the place of the one before. */
export async function noteSizeRequestSent(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  sent: { readonly at: Date; readonly expiresAt: Date; readonly address?: { readonly sealed: string; readonly masked: string } },
): Promise<void> {
  await trx
    .updateTable('size_request')
    .set((eb) => ({
      sent_count: eb('sent_count', '+', 1),
      last_sent_at: sent.at,
      expires_at: sent.expiresAt,
      ...(sent.address ? { address_sealed: sent.address.sealed, address_masked: sent.address.masked } : {}),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** Ends a request that is open, and erases the address with it. @returns false when it was not open any more */
export async function settleSizeRequest(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  status: Exclude<SizeRequestStatus, 'open'>,
  at: Date,
): Promise<boolean> {
  const settled = await trx
    .updateTable('size_request')
    .set({ status, address_sealed: '', address_masked: '', settled_at: at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('status', '=', 'open')
    .executeTakeFirst();
  return settled.numUpdatedRows === 1n;
}
