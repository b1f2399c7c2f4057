import { inTransaction } from '@/db/client';
import { type ApiTokenRecord, listApiTokens as readApiTokens } from '@/db/queries/api-token/api-tokens';
import { authorise } from '@/lib/domain/access';
import { nowOf, type ServiceContext } from '../context';

export interface ApiTokenView extends ApiTokenRecord {
  readonly state: 'works' | 'expired' | 'revoked';
}

export async function listApiTokens(context: ServiceContext): Promise<ApiTokenView[]> {
  const { actor } = context;
  authorise(actor, 'api-token.read');
  const now = nowOf(context);
  const tokens = await inTransaction(actor.siteId, (trx) => readApiTokens(trx, actor.siteId));
  return tokens.map((token) => ({
    ...token,
    state: token.revokedAt ? 'revoked' : token.expiresAt <= now ? 'expired' : 'works',
  }));
}
