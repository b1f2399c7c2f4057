import { inTransaction } from '@/db/client';
import { addPolicyVersion, findPolicy } from '@/db/queries/site-policy/policies';
import { authorise } from '@/lib/domain/access';
import { changedFields } from '@/lib/domain/document/changed-fields';
import { ServiceError, staleVersion } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { editPolicyInput, type PolicyView } from '@/lib/schemas/site-policy';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { setupChanged } from '../pre-check/mark-changed';
import { effectivePolicy } from './effective-policy';

/** Every edit is a new version; a form without a change makes none. */
export async function editPolicy(context: ServiceContext, input: unknown): Promise<PolicyView> {
  const { actor } = context;
  authorise(actor, 'policy.edit');
  const { expectedVersion, form } = parseInput(editPolicyInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const before = effectivePolicy(await findPolicy(trx, siteId));
    if (before.version !== expectedVersion) throw staleVersion(before.version);
    const version = expectedVersion + 1;
    const { version: _counted, ...was } = before.policy;
    const { setUpMinutes, ...policy } = form;
    const fields = changedFields({ ...was, ...before.pathway }, form);
    if (fields.length === 0) return before;
    const added = await addPolicyVersion(trx, {
      siteId, version, document: { schemaVersion: 2, policy: { ...policy, version }, pathway: { setUpMinutes } }, createdBy: authorOf(actor),
    });
    const after = await findPolicy(trx, siteId);
    if (!added) throw staleVersion(after?.version ?? version);
    if (!after) throw new ServiceError('not-found');
    await recordAudit(trx, context, { action: 'policy.edit', subjectType: 'site-policy', subjectId: siteId, fields });
    await setupChanged(trx, siteId, {}, nowOf(context));
    return effectivePolicy(after);
  });
}
