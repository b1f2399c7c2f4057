import { inTransaction } from '@/db/client';
import { insertApiToken } from '@/db/queries/api-token/api-tokens';
import { authorise, SCOPES } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { type CreateApiTokenInput, createApiTokenSchema } from '@/lib/schemas/api-token/api-token';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { makeSecretToken } from '../session/secret-token';

/** A leaked token is found by this prefix in logs and repositories. */
export const API_TOKEN_PREFIX = 'selvedge_';
const DAY = 86_400_000;

/** @returns the secret, this once: only its hash is kept */
export async function createApiToken(
  context: ServiceContext,
  input: CreateApiTokenInput,
): Promise<{ id: string; secret: string; expiresAt: Date }> {
  const { actor } = context;
  authorise(actor, 'api-token.create');
  if (actor.kind !== 'user') throw new ServiceError('not-found');
  const wanted = parseInput(createApiTokenSchema, input);
  const { secret, hash } = makeSecretToken(API_TOKEN_PREFIX);
  const expiresAt = new Date(nowOf(context).getTime() + wanted.days * DAY);
  const id = await inTransaction(actor.siteId, async (trx) => {
    const created = await insertApiToken(trx, {
      siteId: actor.siteId,
      name: wanted.name,
      tokenHash: hash,
      scopes: SCOPES.filter((scope) => wanted.scopes.includes(scope)),
      expiresAt,
      createdBy: actor.userId,
    });
    await recordAudit(trx, context, {
      action: 'api-token.create',
      subjectType: 'api-token',
      subjectId: created,
      fields: ['name', 'scopes', 'expiresAt'],
    });
    return created;
  });
  return { id, secret, expiresAt };
}
