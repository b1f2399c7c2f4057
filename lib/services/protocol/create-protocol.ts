import { inTransaction } from '@/db/client';
import { findProtocol, insertProtocol, protocolNameTaken } from '@/db/queries/protocol/protocols';
import { authorise } from '@/lib/domain/access';
import { parseInput } from '@/lib/schemas/parse-input';
import { createProtocolInput, type ProtocolView } from '@/lib/schemas/protocol';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import type { ServiceContext } from '../context';
import { nameTaken, orNameTaken } from '../name-taken';
import { toProtocolDocuments, toProtocolView } from './to-protocol-view';

/** Adds a protocol with its sequences. */
export async function createProtocol(context: ServiceContext, input: unknown): Promise<ProtocolView> {
  const { actor } = context;
  authorise(actor, 'protocol.edit');
  const form = parseInput(createProtocolInput, input);
  const { siteId } = actor;
  return orNameTaken('name', form.name, () =>
    inTransaction(siteId, async (trx) => {
      if (await protocolNameTaken(trx, siteId, form.name)) throw nameTaken('name', form.name);
      const id = await insertProtocol(trx, { siteId, ...toProtocolDocuments(form), createdBy: authorOf(actor) });
      await recordAudit(trx, context, { action: 'protocol.edit', subjectType: 'protocol', subjectId: id, fields: ['created'] });
      const created = await findProtocol(trx, siteId, id);
      authorise(actor, 'protocol.read', created);
      return toProtocolView(created);
    }),
  );
}
