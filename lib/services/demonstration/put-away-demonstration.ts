import { inTransaction } from '@/db/client';
import { findDemonstration, setPutAway } from '@/db/queries/demonstration/demonstrations';
import { revokeAllShares } from '@/db/queries/demonstration/shares';
import { authorise } from '@/lib/domain/access';
import { type PutAwayInput, putAwayInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/**
 * Takes a demonstration out of the list, or brings it back. Its links are revoked for good: who brings it back later
 * decides anew who may look at it.
 */
export async function putAwayDemonstration(context: ServiceContext, input: PutAwayInput): Promise<{ linksEnded: number }> {
  const { actor } = context;
  const { id, away } = parseInput(putAwayInput, input);
  return inTransaction(actor.siteId, async (trx) => {
    const found = await findDemonstration(trx, actor.siteId, id, { forUpdate: true, putAwayToo: true });
    authorise(actor, 'demonstration.edit', found);
    if (found.putAway === away) return { linksEnded: 0 };
    await setPutAway(trx, actor.siteId, id, away, nowOf(context));
    const linksEnded = away ? await revokeAllShares(trx, actor.siteId, id, nowOf(context)) : 0;
    await recordAudit(trx, context, {
      action: 'demonstration.edit',
      subjectType: 'demonstration',
      subjectId: id,
      fields: linksEnded > 0 ? ['putAway', 'links'] : ['putAway'],
    });
    return { linksEnded };
  });
}
