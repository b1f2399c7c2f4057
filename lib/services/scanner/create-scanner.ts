import { inTransaction } from '@/db/client';
import { findScanner, insertScanner, scannerNameTaken } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import { createScannerInput, type ScannerView } from '@/lib/schemas/scanner';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { nameTaken, orNameTaken } from '../name-taken';
import { setupChanged } from '../pre-check/mark-changed';
import { toScannerView } from './to-scanner-view';

/** Adds a scanner with its limits. */
export async function createScanner(context: ServiceContext, input: unknown): Promise<ScannerView> {
  const { actor } = context;
  authorise(actor, 'scanner.edit');
  const form = parseInput(createScannerInput, input);
  const { siteId } = actor;
  const { name } = form.scanner;
  return orNameTaken('scanner.name', name, () =>
    inTransaction(siteId, async (trx) => {
      if (await scannerNameTaken(trx, siteId, name)) throw nameTaken('scanner.name', name);
      const id = await insertScanner(trx, { siteId, document: { schemaVersion: 1, ...form }, createdBy: authorOf(actor) });
      await recordAudit(trx, context, { action: 'scanner.edit', subjectType: 'scanner', subjectId: id, fields: ['created'] });
      // It may be where bookings that fit nowhere can go.
      await setupChanged(trx, siteId, {}, nowOf(context));
      const created = await findScanner(trx, siteId, id);
      authorise(actor, 'scanner.read', created);
      return toScannerView(created);
    }),
  );
}
