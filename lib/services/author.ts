import type { Actor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';

/** The account that answers for a change: the person, or the lead whose token it is. Nobody else writes documents. */
export function authorOf(actor: Actor): string {
  if (actor.userId === null) throw new ServiceError('not-found');
  return actor.userId;
}
