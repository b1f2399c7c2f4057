import { inTransaction } from '@/db/client';
import { insertImportBatch } from '@/db/queries/import/import-batches';
import { insertImportRows } from '@/db/queries/import/import-rows';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { ROWS_PER_PIECE } from '@/lib/domain/import';
import { nameKey } from '@/lib/domain/import/read-row';
import { BundleError, matchBookings, readBundle } from '@/lib/fhir';
import type { BundleDone } from '@/lib/schemas/import';
import { randomUUID } from 'node:crypto';
import { authorOf } from '../author';
import type { ServiceContext } from '../context';
import { commitStaged } from './commit-import';
import { readImportSetup } from './read-import-setup';

/** Names and ids alike: a sender that knows our ids need not know our names. */
const idsByName = (things: readonly { readonly id: string; readonly name: string }[]) =>
  Object.fromEntries(things.flatMap(({ id, name }) => [[nameKey(name), id], [id, id]]));

function read(bundle: unknown) {
  try {
    return readBundle(bundle);
  } catch (error) {
    if (error instanceof BundleError) throw invalidField('', error.message);
    throw error;
  }
}

/**
 * Takes a FHIR R4 bundle whole: what is on our list is kept, the rest is dropped before anything is written. One
 * transaction; entries that cannot be booked are answered with why and hold nobody up.
 */
export async function importBundle(context: ServiceContext, bundle: unknown): Promise<BundleDone> {
  const { actor } = context;
  authorise(actor, 'booking.import');
  const content = read(bundle);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const { mask, scanners, protocols } = await readImportSetup(trx, siteId);
    const { rows, skipped } = matchBookings(content, { mask, scanners: idsByName(scanners), protocols: idsByName(protocols) });
    const id = randomUUID();
    await insertImportBatch(trx, { siteId, id, format: 'fhir', createdBy: authorOf(actor) });
    for (let from = 0; from < rows.length; from += ROWS_PER_PIECE) {
      await insertImportRows(trx, siteId, id, rows.slice(from, from + ROWS_PER_PIECE));
    }
    return { ...(await commitStaged(trx, context, id)), skipped };
  });
}
