import { inTransaction, type SiteTransaction } from '@/db/client';
import { findSheet, readSheetBytes } from '@/db/queries/plan-sheet/plan-sheets';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import type { SheetRecord } from '@/lib/domain/plan/sheet';
import type { SheetView } from '@/lib/schemas/plan-sheet';
import type { ServiceContext } from '../context';
import { toSheetView } from './sheet-content';

interface Where {
  readonly planId: string;
  readonly sheetId: string;
}

async function loadSheet(trx: SiteTransaction, { actor }: ServiceContext, { planId, sheetId }: Where): Promise<SheetRecord> {
  const sheet = await findSheet(trx, actor.siteId, sheetId);
  authorise(actor, 'plan.read', sheet?.planId === planId ? sheet : null);
  return sheet!;
}

/** Where the making of a sheet stands. */
export async function getSheet(context: ServiceContext, where: Where): Promise<SheetView> {
  return inTransaction(context.actor.siteId, async (trx) => toSheetView(await loadSheet(trx, context, where)));
}

/** The finished file. */
export async function getSheetFile(
  context: ServiceContext,
  where: Where,
): Promise<{ readonly bytes: Buffer; readonly planVersion: number }> {
  return inTransaction(context.actor.siteId, async (trx) => {
    const sheet = await loadSheet(trx, context, where);
    const bytes = sheet.state === 'done' ? await readSheetBytes(trx, context.actor.siteId, sheet.id) : null;
    if (!bytes) throw new ServiceError('not-found');
    return { bytes, planVersion: sheet.planVersion };
  });
}
