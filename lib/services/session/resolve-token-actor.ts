import { inTransaction, resolveToken } from '@/db/client';
import { findTokenActor } from '@/db/queries/api-token/api-tokens';
import type { TokenActor } from '@/lib/domain/access';
import { hashSecretToken } from './secret-token';

/** The token a secret belongs to; null alike for unknown, expired and revoked. */
export async function resolveTokenActor(secret: string, now: Date = new Date()): Promise<TokenActor | null> {
  const match = await resolveToken('api', hashSecretToken(secret));
  if (!match) return null;
  // Read again under row-level security: the gate only says where to look.
  return inTransaction(match.siteId, (trx) => findTokenActor(trx, match.siteId, match.id, now));
}
