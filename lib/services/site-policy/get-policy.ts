import { inTransaction } from '@/db/client';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { authorise } from '@/lib/domain/access';
import type { PolicyView } from '@/lib/schemas/site-policy';
import type { ServiceContext } from '../context';
import { effectivePolicy } from './effective-policy';

/** One version of the site's policy, the newest unless another is named; the standard one for a site that has none. */
export async function getPolicy(
  { actor }: ServiceContext,
  input: { readonly version?: number } = {},
): Promise<PolicyView> {
  authorise(actor, 'policy.read');
  return effectivePolicy(await inTransaction(actor.siteId, (trx) => findPolicy(trx, actor.siteId, input.version)));
}
