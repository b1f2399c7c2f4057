import { inTransaction, type SiteTransaction } from '@/db/client';
import { findDemonstration } from '@/db/queries/demonstration/demonstrations';
import { findHandOut, readHandOutBytes } from '@/db/queries/demonstration/hand-outs';
import { authorise } from '@/lib/domain/access';
import type { HandOutRecord } from '@/lib/domain/demonstration/hand-out';
import { ServiceError } from '@/lib/domain/errors';
import type { HandOutView } from '@/lib/schemas/demonstration';
import type { ServiceContext } from '../context';
import { toHandOutView } from './hand-out-content';

interface Where {
  readonly demonstrationId: string;
  readonly handOutId: string;
}

async function loadHandOut(trx: SiteTransaction, { actor }: ServiceContext, { demonstrationId, handOutId }: Where): Promise<HandOutRecord> {
  authorise(actor, 'demonstration.read', await findDemonstration(trx, actor.siteId, demonstrationId));
  const found = await findHandOut(trx, actor.siteId, handOutId);
  if (found?.demonstrationId !== demonstrationId) throw new ServiceError('not-found');
  return found;
}

/** Where the making of a hand-out stands. */
export async function getHandOut(context: ServiceContext, where: Where): Promise<HandOutView> {
  return inTransaction(context.actor.siteId, async (trx) => toHandOutView(await loadHandOut(trx, context, where)));
}

/** The finished file. */
export async function getHandOutFile(context: ServiceContext, where: Where): Promise<Buffer> {
  return inTransaction(context.actor.siteId, async (trx) => {
    const found = await loadHandOut(trx, context, where);
    const bytes = found.state === 'done' ? await readHandOutBytes(trx, context.actor.siteId, found.id) : null;
    if (!bytes) throw new ServiceError('not-found');
    return bytes;
  });
}
