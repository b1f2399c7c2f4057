import { inTransaction } from '@/db/client';
import { findPerson } from '@/db/queries/app-user/read-people';
import { setDisabled } from '@/db/queries/app-user/write-people';
import { authorise } from '@/lib/domain/access';
import { parseInput } from '@/lib/schemas/parse-input';
import { personIdSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';

/** Lets a disabled person sign in again with the password they had. Sessions from before stay ended. */
export async function enablePerson(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(personIdSchema, input);
  await inTransaction(actor.siteId, async (trx) => {
    const person = await findPerson(trx, actor.siteId, id);
    authorise(actor, 'person.disable', person);
    if (person.status !== 'disabled') return;
    await setDisabled(trx, actor.siteId, id, null);
    await recordAudit(trx, context, {
      action: 'person.disable',
      subjectType: 'person',
      subjectId: id,
      fields: ['disabledAt'],
    });
  });
}
