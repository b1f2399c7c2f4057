import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { ReadingSource } from '@/lib/domain/case/model';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';

/** All readings of a booking, newest first. They are only ever added, so the newest of a quantity is what counts. */
export async function listSizeReadings(trx: SiteTransaction, siteId: string, bookingId: string): Promise<SizeReading[]> {
  const rows = await trx
    .selectFrom('size_reading')
    .select(['id', 'quantity', 'value', 'source', 'spread', 'taken_on', 'tape_site', 'recorded_at'])
    .where('site_id', '=', siteId)
    .where('booking_id', '=', bookingId)
    .orderBy('recorded_at', 'desc')
    .orderBy('id')
    .execute();
  return rows.map((row) => ({
    id: row.id,
    quantity: row.quantity as SizeQuantity,
    value: row.value,
    source: row.source as ReadingSource,
    spread: row.spread,
    takenOn: row.taken_on,
    ...(row.tape_site === '' ? {} : { tapeSite: row.tape_site as TapeSite }),
    recordedAt: row.recorded_at,
  }));
}

export async function insertSizeReadings(
  trx: SiteTransaction,
  siteId: string,
  bookingId: string,
  readings: readonly (Omit<SizeReading, 'id' | 'recordedAt'> & { readonly id?: string })[],
  recorded: { readonly by: string; readonly at: Date },
): Promise<void> {
  if (readings.length === 0) return;
  await trx
    .insertInto('size_reading')
    .values(
      readings.map((reading) => ({
        site_id: siteId,
        id: reading.id ?? sql<string>`gen_random_uuid()`,
        booking_id: bookingId,
        quantity: reading.quantity,
        value: reading.value,
        source: reading.source,
        spread: reading.spread,
        taken_on: reading.takenOn,
        tape_site: reading.tapeSite ?? '',
        recorded_by: recorded.by,
        recorded_at: recorded.at,
      })),
    )
    // Sent again because its answer was lost on the way: it is there already.
    .onConflict((conflict) => conflict.columns(['site_id', 'id']).doNothing())
    .execute();
}
