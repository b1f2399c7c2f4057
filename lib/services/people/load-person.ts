import { inTransaction } from '@/db/client';
import { countLiveTokensBy } from '@/db/queries/api-token/api-tokens';
import { findPerson } from '@/db/queries/app-user/read-people';
import { authorise } from '@/lib/domain/access';
import type { Person } from '@/lib/domain/people';
import { parseInput } from '@/lib/schemas/parse-input';
import { personIdSchema } from '@/lib/schemas/people/person';
import { nowOf, type ServiceContext } from '../context';

export interface PersonDetail extends Person {
  /** API tokens made by this person that still work; they outlive a disabled account. */
  readonly liveTokens: number;
}

export async function loadPerson(context: ServiceContext, input: { readonly id: string }): Promise<PersonDetail> {
  const { actor } = context;
  const { id } = parseInput(personIdSchema, input);
  return inTransaction(actor.siteId, async (trx) => {
    const person = await findPerson(trx, actor.siteId, id);
    authorise(actor, 'person.read', person);
    return { ...person, liveTokens: await countLiveTokensBy(trx, actor.siteId, id, nowOf(context)) };
  });
}
