import { inTransaction } from '@/db/client';
import { findDemonstration } from '@/db/queries/demonstration/demonstrations';
import { findShare, insertShare, listShares as readShares, revokeShare as revoke } from '@/db/queries/demonstration/shares';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { type CreateShareInput, createShareInput, revokeShareInput, type ShareLine } from '@/lib/schemas/demonstration';
import { idParams } from '@/lib/schemas/fields/ids';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { makeSecretToken } from '../session/secret-token';

const DAY = 86_400_000;

/** @returns the secret of the link, this once: only its hash is kept */
export async function createShare(context: ServiceContext, input: CreateShareInput): Promise<{ id: string; secret: string; expiresAt: Date }> {
  const { actor } = context;
  const { id: demonstrationId, days } = parseInput(createShareInput, input);
  if (actor.kind !== 'user') throw new ServiceError('not-found');
  const { secret, hash } = makeSecretToken();
  const expiresAt = new Date(nowOf(context).getTime() + days * DAY);
  return inTransaction(actor.siteId, async (trx) => {
    authorise(actor, 'demonstration.share', await findDemonstration(trx, actor.siteId, demonstrationId));
    const id = await insertShare(trx, { siteId: actor.siteId, demonstrationId, tokenHash: hash, expiresAt, createdBy: actor.userId });
    await recordAudit(trx, context, {
      action: 'demonstration.share', subjectType: 'demonstration', subjectId: demonstrationId, fields: ['link', 'expiresAt'],
    });
    return { id, secret, expiresAt };
  });
}

export async function listShares(context: ServiceContext, input: { readonly id: string }): Promise<ShareLine[]> {
  const { actor } = context;
  const { id } = parseInput(idParams, input);
  const now = nowOf(context);
  return inTransaction(actor.siteId, async (trx) => {
    authorise(actor, 'demonstration.share', await findDemonstration(trx, actor.siteId, id));
    return (await readShares(trx, actor.siteId, id)).map((share) => ({
      id: share.id,
      state: share.revokedAt ? 'revoked' : share.expiresAt <= now ? 'expired' : 'works',
      madeAt: share.createdAt.toISOString(),
      expiresAt: share.expiresAt.toISOString(),
      openings: share.openings,
      lastOpenedAt: share.lastOpenedAt?.toISOString() ?? null,
    }));
  });
}

/** From the next load on the link is as good as unknown. Revoking twice changes nothing. */
export async function revokeShare(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(revokeShareInput, input);
  await inTransaction(actor.siteId, async (trx) => {
    const share = await findShare(trx, actor.siteId, id);
    authorise(actor, 'demonstration.share', share);
    if (!(await revoke(trx, actor.siteId, id, nowOf(context)))) return;
    await recordAudit(trx, context, {
      action: 'demonstration.share', subjectType: 'demonstration', subjectId: share.demonstrationId, fields: ['link', 'revokedAt'],
    });
  });
}
