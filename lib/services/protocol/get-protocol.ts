import { inTransaction } from '@/db/client';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { authorise } from '@/lib/domain/access';
import type { ProtocolView } from '@/lib/schemas/protocol';
import type { ServiceContext } from '../context';
import { toProtocolView } from './to-protocol-view';

/** One protocol with its sequences, in its newest version unless another is named. */
export async function getProtocol(
  { actor }: ServiceContext,
  input: { readonly id: string; readonly version?: number },
): Promise<ProtocolView> {
  const record = await inTransaction(actor.siteId, (trx) => findProtocol(trx, actor.siteId, input.id, input.version));
  authorise(actor, 'protocol.read', record);
  return toProtocolView(record);
}
