import { inTransaction } from '@/db/client';
import { listPeople as readPeople } from '@/db/queries/app-user/read-people';
import { authorise } from '@/lib/domain/access';
import type { Person } from '@/lib/domain/people';
import type { ServiceContext } from '../context';

/** Everyone with an account at the actor's site, by name. */
export async function listPeople(context: ServiceContext): Promise<Person[]> {
  const { actor } = context;
  authorise(actor, 'person.read');
  return inTransaction(actor.siteId, (trx) => readPeople(trx, actor.siteId));
}
