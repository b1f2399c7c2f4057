import { inTransaction } from '@/db/client';
import { addProtocolVersion, findProtocol, protocolNameTaken } from '@/db/queries/protocol/protocols';
import { authorise } from '@/lib/domain/access';
import { changedFields } from '@/lib/domain/document/changed-fields';
import { staleVersion } from '@/lib/domain/errors';
import type { ProtocolRecord } from '@/lib/domain/protocol/document';
import { parseInput } from '@/lib/schemas/parse-input';
import { editProtocolInput, type ProtocolForm, type ProtocolView } from '@/lib/schemas/protocol';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { setupChanged } from '../pre-check/mark-changed';
import { nameTaken, orNameTaken } from '../name-taken';
import { toProtocolDocuments, toProtocolView } from './to-protocol-view';

/** Sequences are compared by position, so the log says which one changed and in which fields. */
function fieldsChanged(before: ProtocolRecord, form: ProtocolForm): string[] {
  const { document, sequences } = toProtocolDocuments(form);
  const byPosition = (list: readonly unknown[]) => Object.fromEntries(list.map((each, index) => [index + 1, each]));
  return [
    ...changedFields(before.document, document),
    ...changedFields(
      { sequences: byPosition(before.sequences.map(({ prescription }) => prescription)) },
      { sequences: byPosition(sequences.map(({ prescription }) => prescription)) },
    ),
  ];
}

/** Every edit is a new version of the whole protocol; a form without a change makes none. */
export async function editProtocol(context: ServiceContext, input: unknown): Promise<ProtocolView> {
  const { actor } = context;
  authorise(actor, 'protocol.edit');
  const { id, expectedVersion, form } = parseInput(editProtocolInput, input);
  const { siteId } = actor;
  return orNameTaken('form.name', form.name, () =>
    inTransaction(siteId, async (trx) => {
      const before = await findProtocol(trx, siteId, id);
      authorise(actor, 'protocol.edit', before);
      if (before.version !== expectedVersion) throw staleVersion(before.version);
      const fields = fieldsChanged(before, form);
      if (fields.length === 0) return toProtocolView(before);
      if (await protocolNameTaken(trx, siteId, form.name, id)) throw nameTaken('form.name', form.name);
      const added = await addProtocolVersion(trx, {
        siteId, id, ...toProtocolDocuments(form), createdBy: authorOf(actor), expectedVersion,
      });
      const after = await findProtocol(trx, siteId, id);
      authorise(actor, 'protocol.edit', after);
      if (!added) throw staleVersion(after.version);
      await recordAudit(trx, context, { action: 'protocol.edit', subjectType: 'protocol', subjectId: id, fields });
      await setupChanged(trx, siteId, { protocolId: id }, nowOf(context));
      return toProtocolView(after);
    }),
  );
}
