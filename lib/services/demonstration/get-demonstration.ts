import { inTransaction } from '@/db/client';
import { findDemonstration, listScenes } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
import type { DemonstrationView } from '@/lib/schemas/demonstration';
import { idParams } from '@/lib/schemas/fields/ids';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '../context';

export async function getDemonstration(context: ServiceContext, input: { readonly id: string }): Promise<DemonstrationView> {
  const { actor } = context;
  const { id } = parseInput(idParams, input);
  return inTransaction(actor.siteId, async (trx) => {
    const found = await findDemonstration(trx, actor.siteId, id);
    authorise(actor, 'demonstration.read', found);
    return { id, title: found.title, version: found.version, scenes: await listScenes(trx, actor.siteId, id) };
  });
}
