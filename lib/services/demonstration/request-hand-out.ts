import { inTransaction } from '@/db/client';
import { findDemonstration } from '@/db/queries/demonstration/demonstrations';
import { findHandOutOf, queueHandOut } from '@/db/queries/demonstration/hand-outs';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { enqueue } from '@/lib/jobs';
import { type HandOutView, requestHandOutInput, type RequestHandOutInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { handOutContent, readHandOut, toHandOutView } from './hand-out-content';

/** Asks for all scenes as PDF. What is made already, or waits, is answered as it stands: the same hand-out is made once. */
export async function requestHandOut(context: ServiceContext, input: RequestHandOutInput): Promise<HandOutView> {
  const { demonstrationId, paper } = parseInput(requestHandOutInput, input);
  const { actor } = context;
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    authorise(actor, 'demonstration.render', await findDemonstration(trx, siteId, demonstrationId));
    const printed = await readHandOut(trx, siteId, demonstrationId);
    if (!printed) throw new ServiceError('not-found');
    if (printed.scenes.length === 0) throw new ServiceError('invalid', { message: 'There are no scenes yet; a hand-out needs one at least.' });
    const content = handOutContent({ siteId, demonstrationId }, printed, paper);
    const before = await findHandOutOf(trx, content);
    if (before && before.state !== 'failed') return toHandOutView(before);
    await queueHandOut(trx, content, { by: authorOf(actor), at: nowOf(context) });
    const queued = await findHandOutOf(trx, content);
    if (!queued) throw new ServiceError('unavailable');
    await enqueue(trx, 'make-hand-out', { siteId, handOutId: queued.id });
    await recordAudit(trx, context, { action: 'demonstration.render', subjectType: 'demonstration', subjectId: demonstrationId, fields: ['paper'] });
    return toHandOutView(queued);
  });
}
