import { inTransaction } from '@/db/client';
import { listDemonstrations as readDemonstrations } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
import type { DemonstrationLine } from '@/lib/schemas/demonstration';
import { nowOf, type ServiceContext } from '../context';

/** Newest change first; those put away are a list of their own. */
export async function listDemonstrations(context: ServiceContext, options: { readonly putAway?: boolean } = {}): Promise<DemonstrationLine[]> {
  const { actor } = context;
  authorise(actor, 'demonstration.read');
  const found = await inTransaction(actor.siteId, (trx) => readDemonstrations(trx, actor.siteId, nowOf(context), options.putAway));
  return found.map(({ id, title, scenes, links, changedAt }) => ({ id, title, scenes, links, changedAt: changedAt.toISOString() }));
}
