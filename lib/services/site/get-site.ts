import { inTransaction } from '@/db/client';
import { findSite } from '@/db/queries/site/sites';
import { authorise } from '@/lib/domain/access';
import type { SiteView } from '@/lib/schemas/site';
import type { ServiceContext } from '../context';

/** The actor's own site. */
export async function getSite({ actor }: ServiceContext): Promise<SiteView> {
  const site = await inTransaction(actor.siteId, (trx) => findSite(trx, actor.siteId));
  authorise(actor, 'site.read', site);
  return { id: site.siteId, name: site.name, accessionMask: site.accessionMask };
}
