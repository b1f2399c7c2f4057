import { inTransaction } from '@/db/client';
import { findPerson } from '@/db/queries/app-user/read-people';
import { updatePerson } from '@/db/queries/app-user/write-people';
import { authorise, normaliseRoles } from '@/lib/domain/access';
import { staleVersion } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { type EditPersonInput, editPersonSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';
import { keepOneLead } from './keep-one-lead';

/** Changes a person's name and roles. Roles count from their next request on, without a new sign-in. */
export async function editPerson(context: ServiceContext, input: EditPersonInput): Promise<{ version: number }> {
  const { actor } = context;
  const wanted = parseInput(editPersonSchema, input);
  const roles = normaliseRoles(wanted.roles);
  return inTransaction(actor.siteId, async (trx) => {
    const stored = await findPerson(trx, actor.siteId, wanted.id);
    authorise(actor, 'person.edit', stored);
    if (stored.version !== wanted.version) throw staleVersion(stored.version);

    const fields: string[] = [];
    if (stored.displayName !== wanted.displayName) fields.push('displayName');
    if (normaliseRoles(stored.roles).join() !== roles.join()) fields.push('roles');
    if (fields.length === 0) return { version: stored.version };

    if (!roles.includes('lead')) await keepOneLead(trx, actor.siteId, wanted.id, 'roles');
    const change = { displayName: wanted.displayName, roles };
    if (!(await updatePerson(trx, actor.siteId, wanted.id, wanted.version, change))) {
      throw staleVersion(wanted.version + 1);
    }
    await recordAudit(trx, context, { action: 'person.edit', subjectType: 'person', subjectId: wanted.id, fields });
    return { version: wanted.version + 1 };
  });
}
