import { inTransaction } from '@/db/client';
import { findProtocol, setProtocolArchived } from '@/db/queries/protocol/protocols';
import { authorise } from '@/lib/domain/access';
import { staleVersion } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { archiveProtocolInput, type ProtocolView } from '@/lib/schemas/protocol';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { toProtocolView } from './to-protocol-view';

async function setArchived(context: ServiceContext, input: unknown, archived: boolean): Promise<ProtocolView> {
  const { actor } = context;
  authorise(actor, 'protocol.edit');
  const { id, expectedVersion } = parseInput(archiveProtocolInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const before = await findProtocol(trx, siteId, id);
    authorise(actor, 'protocol.edit', before);
    if ((before.archivedAt !== null) === archived) return toProtocolView(before);
    const changed = await setProtocolArchived(trx, siteId, id, expectedVersion, archived ? nowOf(context) : null);
    const after = await findProtocol(trx, siteId, id);
    authorise(actor, 'protocol.edit', after);
    if (!changed) throw staleVersion(after.version);
    await recordAudit(trx, context, {
      action: 'protocol.edit', subjectType: 'protocol', subjectId: id, fields: [archived ? 'archived' : 'restored'],
    });
    return toProtocolView(after);
  });
}

/** Takes a protocol out of lists and new bookings; what was booked and planned with it stays. */
export function archiveProtocol(context: ServiceContext, input: unknown): Promise<ProtocolView> {
  return setArchived(context, input, true);
}

export function restoreProtocol(context: ServiceContext, input: unknown): Promise<ProtocolView> {
  return setArchived(context, input, false);
}
