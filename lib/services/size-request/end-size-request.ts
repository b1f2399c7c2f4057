import { inTransaction } from '@/db/client';
import { lockSizeRequest, settleSizeRequest } from '@/db/queries/size-request/size-requests';
import { authorise, systemActor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/** Takes a request back: its link works no more, and its address is erased. */
export async function cancelSizeRequest(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  await inTransaction(actor.siteId, async (trx) => {
    const request = await lockSizeRequest(trx, actor.siteId, input.id);
    authorise(actor, 'size-request.cancel', request);
    if (!(await settleSizeRequest(trx, actor.siteId, request.id, 'cancelled', nowOf(context)))) {
      throw new ServiceError('conflict', { message: `This size request is ${request.status} already.` });
    }
    await recordAudit(trx, context, { action: 'size-request.cancel', subjectType: 'size-request', subjectId: request.id, fields: ['status', 'address'] });
  });
}

/** The worker's: a request nobody answered in time loses its address. @returns whether there was one to end */
export async function expireSizeRequest(where: { readonly siteId: string; readonly id: string }, now: Date = new Date()): Promise<boolean> {
  const actor = systemActor(where.siteId, 'size-request-expiry');
  return inTransaction(where.siteId, async (trx) => {
    const request = await lockSizeRequest(trx, where.siteId, where.id);
    if (!request || request.expiresAt > now) return false;
    authorise(actor, 'size-request.cancel', request);
    if (!(await settleSizeRequest(trx, where.siteId, where.id, 'expired', now))) return false;
    await recordAudit(trx, { actor }, { action: 'size-request.cancel', subjectType: 'size-request', subjectId: where.id, fields: ['status', 'address'] });
    return true;
  });
}
