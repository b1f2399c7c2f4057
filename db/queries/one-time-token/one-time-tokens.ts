import type { SiteTransaction } from '@/db/client';

export async function insertOneTimeToken(
  trx: SiteTransaction,
  token: { siteId: string; kind: 'set-password'; tokenHash: string; userId: string; expiresAt: Date },
): Promise<string> {
  const row = await trx
    .insertInto('one_time_token')
    .values({
      site_id: token.siteId,
      kind: token.kind,
      token_hash: token.tokenHash,
      user_id: token.userId,
      expires_at: token.expiresAt,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

/** Whose unused token this is, without using it. */
export async function findTokenUser(trx: SiteTransaction, siteId: string, id: string, now: Date): Promise<string | null> {
  const row = await trx
    .selectFrom('one_time_token')
    .select('user_id')
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('used_at', 'is', null)
    .where('expires_at', '>', now)
    .executeTakeFirst();
  return row?.user_id ?? null;
}

/** Uses the token. Of two requests at the same moment one gets null. */
export async function consumeOneTimeToken(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  now: Date,
): Promise<string | null> {
  const row = await trx
    .updateTable('one_time_token')
    .set({ used_at: now })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('used_at', 'is', null)
    .where('expires_at', '>', now)
    .returning('user_id')
    .executeTakeFirst();
  return row?.user_id ?? null;
}

/** No link that is still under way to this person works any more. */
export async function voidOneTimeTokens(
  trx: SiteTransaction,
  siteId: string,
  userId: string,
  kind: 'set-password',
  now: Date,
): Promise<void> {
  await trx
    .updateTable('one_time_token')
    .set({ used_at: now })
    .where('site_id', '=', siteId)
    .where('user_id', '=', userId)
    .where('kind', '=', kind)
    .where('used_at', 'is', null)
    .execute();
}
