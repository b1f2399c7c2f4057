import { inTransaction } from '@/db/client';
import { addScannerVersion, findScanner, scannerNameTaken } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import { changedFields } from '@/lib/domain/document/changed-fields';
import { staleVersion } from '@/lib/domain/errors';
import type { ScannerDocument } from '@/lib/domain/scanner/document';
import { parseInput } from '@/lib/schemas/parse-input';
import { editScannerInput, type ScannerView } from '@/lib/schemas/scanner';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { setupChanged } from '../pre-check/mark-changed';
import { nameTaken, orNameTaken } from '../name-taken';
import { toScannerView } from './to-scanner-view';

/** Every edit is a new version; older ones stay for the plans that rest on them. A form without a change makes none. */
export async function editScanner(context: ServiceContext, input: unknown): Promise<ScannerView> {
  const { actor } = context;
  authorise(actor, 'scanner.edit');
  const { id, expectedVersion, form } = parseInput(editScannerInput, input);
  const { siteId } = actor;
  const { name } = form.scanner;
  return orNameTaken('form.scanner.name', name, () =>
    inTransaction(siteId, async (trx) => {
      const before = await findScanner(trx, siteId, id);
      authorise(actor, 'scanner.edit', before);
      if (before.version !== expectedVersion) throw staleVersion(before.version);
      const document: ScannerDocument = { schemaVersion: 1, ...form };
      const fields = changedFields(before.document, document);
      if (fields.length === 0) return toScannerView(before);
      if (await scannerNameTaken(trx, siteId, name, id)) throw nameTaken('form.scanner.name', name);
      const added = await addScannerVersion(trx, { siteId, id, document, createdBy: authorOf(actor), expectedVersion });
      const after = await findScanner(trx, siteId, id);
      authorise(actor, 'scanner.edit', after);
      if (!added) throw staleVersion(after.version);
      await recordAudit(trx, context, { action: 'scanner.edit', subjectType: 'scanner', subjectId: id, fields });
      await setupChanged(trx, siteId, {}, nowOf(context));
      return toScannerView(after);
    }),
  );
}
