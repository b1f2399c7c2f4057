import { inTransaction } from '@/db/client';
import { findApiToken, revokeApiToken as revoke } from '@/db/queries/api-token/api-tokens';
import { authorise } from '@/lib/domain/access';
import { apiTokenIdSchema } from '@/lib/schemas/api-token/api-token';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/** From the next request on the token is as good as unknown. Revoking twice changes nothing. */
export async function revokeApiToken(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(apiTokenIdSchema, input);
  await inTransaction(actor.siteId, async (trx) => {
    authorise(actor, 'api-token.revoke', await findApiToken(trx, actor.siteId, id));
    if (!(await revoke(trx, actor.siteId, id, nowOf(context)))) return;
    await recordAudit(trx, context, {
      action: 'api-token.revoke',
      subjectType: 'api-token',
      subjectId: id,
      fields: ['revokedAt'],
    });
  });
}
