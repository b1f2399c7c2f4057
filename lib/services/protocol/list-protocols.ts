import { inTransaction } from '@/db/client';
import { listProtocols as readProtocols } from '@/db/queries/protocol/protocols';
import { authorise } from '@/lib/domain/access';
import type { ProtocolListItem } from '@/lib/schemas/protocol';
import type { ServiceContext } from '../context';
import { toProtocolListItem } from './to-protocol-view';

/** The site's protocols by name; archived ones only when asked for. */
export async function listProtocols(
  { actor }: ServiceContext,
  options: { readonly includeArchived?: boolean } = {},
): Promise<ProtocolListItem[]> {
  authorise(actor, 'protocol.read');
  const records = await inTransaction(actor.siteId, (trx) =>
    readProtocols(trx, actor.siteId, { includeArchived: options.includeArchived ?? false }),
  );
  return records.map(toProtocolListItem);
}
