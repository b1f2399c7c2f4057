import { inTransaction } from '@/db/client';
import { findSheetOf, queueSheet } from '@/db/queries/plan-sheet/plan-sheets';
import { findPlan } from '@/db/queries/plan/plans';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { enqueue } from '@/lib/jobs';
import { parseInput } from '@/lib/schemas/parse-input';
import { requestSheetInput, type SheetView } from '@/lib/schemas/plan-sheet';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { contentOf, readSheetSource, toSheetView } from './sheet-content';

/** Asks for a plan sheet as PDF. What is made already, or waits, is answered as it stands: the same sheet is made once. */
export async function requestSheet(context: ServiceContext, input: unknown): Promise<SheetView> {
  const { planId, version, paper } = parseInput(requestSheetInput, input);
  const { actor } = context;
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    authorise(actor, 'plan.render', await findPlan(trx, siteId, planId, version));
    const source = await readSheetSource(trx, { siteId, planId, version });
    if (!source) throw new ServiceError('not-found');
    const content = contentOf(siteId, source, paper);
    const before = await findSheetOf(trx, content);
    if (before && before.state !== 'failed') return toSheetView(before);
    await queueSheet(trx, content, { by: authorOf(actor), at: nowOf(context) });
    const queued = await findSheetOf(trx, content);
    if (!queued) throw new ServiceError('unavailable');
    await enqueue(trx, 'make-plan-sheet', { siteId, sheetId: queued.id });
    await recordAudit(trx, context, { action: 'plan.render', subjectType: 'plan', subjectId: planId, fields: ['paper'] });
    return toSheetView(queued);
  });
}
