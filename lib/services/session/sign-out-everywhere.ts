import { inTransaction } from '@/db/client';
import { endSessions } from '@/db/queries/app-user/write-people';
import { authorise } from '@/lib/domain/access';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';

/** Ends every session of the actor, this one included. */
export async function signOutEverywhere(context: ServiceContext): Promise<void> {
  const { actor } = context;
  const { siteId } = actor;
  const userId = actor.userId ?? undefined;
  const own = userId === undefined ? null : { siteId, id: userId, ownerId: userId };
  authorise(actor, 'account.sign-out-everywhere', own);
  await inTransaction(siteId, async (trx) => {
    await endSessions(trx, siteId, own.id);
    await recordAudit(trx, context, {
      action: 'account.sign-out-everywhere',
      subjectType: 'person',
      subjectId: own.id,
      fields: ['sessionEpoch'],
    });
  });
}
