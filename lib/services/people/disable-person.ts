import { inTransaction } from '@/db/client';
import { voidOneTimeTokens } from '@/db/queries/one-time-token/one-time-tokens';
import { findPerson } from '@/db/queries/app-user/read-people';
import { setDisabled } from '@/db/queries/app-user/write-people';
import { authorise } from '@/lib/domain/access';
import { parseInput } from '@/lib/schemas/parse-input';
import { personIdSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { keepOneLead } from './keep-one-lead';

/** Ends an account: no sign-in, no session, no mailed link works any more. What the person did stays. */
export async function disablePerson(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(personIdSchema, input);
  const now = nowOf(context);
  await inTransaction(actor.siteId, async (trx) => {
    const person = await findPerson(trx, actor.siteId, id);
    authorise(actor, 'person.disable', person);
    if (person.status === 'disabled') return;
    await keepOneLead(trx, actor.siteId, id, 'status');
    await setDisabled(trx, actor.siteId, id, now);
    await voidOneTimeTokens(trx, actor.siteId, id, 'set-password', now);
    await recordAudit(trx, context, {
      action: 'person.disable',
      subjectType: 'person',
      subjectId: id,
      fields: ['disabledAt'],
    });
  });
}
