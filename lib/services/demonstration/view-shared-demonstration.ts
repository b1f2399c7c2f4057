import { inTransaction, resolveToken } from '@/db/client';
import { findDemonstration, listScenes } from '@/db/queries/demonstration/demonstrations';
import { countOpening, findShare } from '@/db/queries/demonstration/shares';
import { authorise, linkActor } from '@/lib/domain/access';
import { withoutPrivateParts } from '@/lib/domain/demonstration/scene';
import { ServiceError } from '@/lib/domain/errors';
import type { SharedDemonstration } from '@/lib/schemas/demonstration';
import { hashSecretToken } from '../session/secret-token';

/** 32 bytes in base64url; anything else is no link of ours and costs no look-up. */
const TOKEN = /^[\w-]{43}$/;

/** What the holder of a link sees. Unknown, revoked and expired end in the same way, so that nobody learns which it was. */
export async function viewSharedDemonstration(input: { readonly token: string }, now: Date = new Date()): Promise<SharedDemonstration> {
  const match = TOKEN.test(input.token) ? await resolveToken('demonstration-share', hashSecretToken(input.token)) : null;
  if (!match) throw new ServiceError('not-found');
  return inTransaction(match.siteId, async (trx) => {
    const share = await findShare(trx, match.siteId, match.id);
    authorise(linkActor(match.siteId, match.id), 'demonstration.view', share);
    const found = await findDemonstration(trx, match.siteId, share.demonstrationId);
    if (!found || !(await countOpening(trx, match.siteId, share.id, now))) throw new ServiceError('not-found');
    return { title: found.title, scenes: withoutPrivateParts(await listScenes(trx, match.siteId, share.demonstrationId)) };
  });
}
