import type { SiteTransaction } from '@/db/client';
import type { Actor } from '@/lib/domain/access';
import { actorReference } from '@/lib/domain/access';
import { readEntryDocument, type BookingEntry, type EntryKind, type EntryDocument } from '@/lib/domain/booking/entry';

/** Adds a line to what is written on a booking. Lines are never changed. */
export async function insertEntry(
  trx: SiteTransaction,
  actor: Actor,
  entry: { readonly bookingId: string; readonly kind: EntryKind; readonly note?: string; readonly data?: Omit<EntryDocument, 'schemaVersion'>; readonly now: Date },
): Promise<string> {
  const { kind, id: actorId } = actorReference(actor);
  const { id } = await trx
    .insertInto('booking_entry')
    .values({
      site_id: actor.siteId,
      booking_id: entry.bookingId,
      kind: entry.kind,
      note: entry.note ?? '',
      data: JSON.stringify({ schemaVersion: 1, ...entry.data }),
      actor_kind: kind,
      actor_id: actorId,
      written_at: entry.now,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return id;
}

/** Newest first. */
export async function listEntries(trx: SiteTransaction, siteId: string, bookingId: string, limit: number): Promise<BookingEntry[]> {
  const rows = await trx
    .selectFrom('booking_entry as e')
    .leftJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'e.site_id').onRef('u.id', '=', 'e.actor_id'))
    .leftJoin('api_token as k', (join) => join.onRef('k.site_id', '=', 'e.site_id').onRef('k.id', '=', 'e.actor_id'))
    .select(['e.id', 'e.kind', 'e.note', 'e.data', 'e.actor_kind', 'e.written_at', 'u.display_name', 'u.roles', 'k.name'])
    .where('e.site_id', '=', siteId)
    .where('e.booking_id', '=', bookingId)
    .orderBy('e.written_at', 'desc')
    .orderBy('e.id')
    .limit(limit)
    .execute();
  return rows.map((row) => ({
    id: row.id,
    kind: row.kind as EntryKind,
    note: row.note,
    data: readEntryDocument(row.data),
    by: row.display_name ?? row.name ?? (row.actor_kind === 'system' ? 'Selvedge' : 'someone who has left'),
    roles: (row.roles ?? []) as string[],
    at: row.written_at,
  }));
}
