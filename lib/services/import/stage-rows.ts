import { inTransaction } from '@/db/client';
import { lockImportBatch } from '@/db/queries/import/import-batches';
import { compareImportRows, insertImportRows, type ComparedRow } from '@/db/queries/import/import-rows';
import { authorise } from '@/lib/domain/access';
import { accessionRefusal } from '@/lib/domain/booking/accession';
import { ServiceError } from '@/lib/domain/errors';
import type { ImportRow } from '@/lib/domain/import';
import { type StagedRow, type StagedRows, stageRowsInput } from '@/lib/schemas/import';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '../context';
import { readImportSetup, type ImportSetup } from './read-import-setup';

/** Why a row cannot be a booking here; undefined when it can. Nothing of the row is repeated. */
function refusalOf(row: ImportRow, { mask, scanners, protocols }: ImportSetup): string | undefined {
  if (accessionRefusal(row.accession, mask)) return `Accession number: not in the form ${mask}, or like a name or a date`;
  if (!scanners.some(({ id }) => id === row.scannerId)) return 'Scanner: not one in use here';
  if (!protocols.some(({ id }) => id === row.protocolId)) return 'Protocol: not one in use here';
  return undefined;
}

function toStaged(row: ComparedRow): StagedRow {
  const { number } = row;
  if (!row.staged) return { number, outcome: 'skipped', note: 'Accession number: stands in an earlier row; the first one counts' };
  const sizes = row.newReadings === 0 ? [] : [row.newReadings === 1 ? '1 size' : `${row.newReadings} sizes`];
  if (!row.known) return { number, outcome: 'created', note: sizes.join('') };
  const changes = [
    ...(row.moved ? ['scanner'] : []), ...(row.retimed ? ['time'] : []), ...(row.reslotted ? ['slot'] : []),
    ...(row.reprotocolled ? ['protocol'] : []), ...sizes,
  ];
  return { number, outcome: changes.length === 0 ? 'same' : 'changed', note: changes.join(', ') };
}

/** Takes one piece of a file and says of every row what it will do. Nothing is booked yet; a piece sent again is one. */
export async function stageRows(context: ServiceContext, input: unknown): Promise<StagedRows> {
  const { actor } = context;
  authorise(actor, 'booking.import');
  const { importId, rows } = parseInput(stageRowsInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const batch = await lockImportBatch(trx, siteId, importId);
    authorise(actor, 'booking.import', batch);
    if (batch.status !== 'staging') throw new ServiceError('conflict', { message: `This import is ${batch.status} already.` });
    const setup = await readImportSetup(trx, siteId);
    const refused = new Map(rows.map((row) => [row.number, refusalOf(row, setup)] as const));
    const good = rows.filter(({ number }) => refused.get(number) === undefined);
    await insertImportRows(trx, siteId, importId, good);
    const compared = await compareImportRows(trx, siteId, importId, good.map(({ number }) => number));
    const staged = new Map(compared.map((row) => [row.number, toStaged(row)]));
    return {
      rows: rows.map(({ number }) => staged.get(number) ?? { number, outcome: 'skipped', note: refused.get(number) ?? '' }),
    };
  });
}
