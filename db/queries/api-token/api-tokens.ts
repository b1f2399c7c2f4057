import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { isScope, type Scope, type TokenActor } from '@/lib/domain/access';

/** A token as leads see it: everything but the hash. */
export interface ApiTokenRecord {
  readonly siteId: string;
  readonly id: string;
  readonly name: string;
  readonly scopes: readonly Scope[];
  readonly createdAt: Date;
  readonly createdByName: string;
  readonly expiresAt: Date;
  readonly revokedAt: Date | null;
}

const COLUMNS = [
  'api_token.site_id',
  'api_token.id',
  'api_token.name',
  'api_token.scopes',
  'api_token.created_at',
  'api_token.expires_at',
  'api_token.revoked_at',
  'app_user.display_name',
] as const;

function readable(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('api_token')
    .innerJoin('app_user', (join) =>
      join
        .onRef('app_user.site_id', '=', 'api_token.site_id')
        .onRef('app_user.id', '=', 'api_token.created_by'),
    )
    .select(COLUMNS)
    .where('api_token.site_id', '=', siteId);
}

type ReadableRow = Awaited<ReturnType<ReturnType<typeof readable>['execute']>>[number];

function toRecord(row: ReadableRow): ApiTokenRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    name: row.name,
    scopes: row.scopes.filter(isScope),
    createdAt: row.created_at,
    createdByName: row.display_name,
    expiresAt: row.expires_at,
    revokedAt: row.revoked_at,
  };
}

export async function listApiTokens(trx: SiteTransaction, siteId: string): Promise<ApiTokenRecord[]> {
  const rows = await readable(trx, siteId)
    .orderBy('api_token.created_at', 'desc')
    .orderBy('api_token.id')
    .execute();
  return rows.map(toRecord);
}

export async function findApiToken(trx: SiteTransaction, siteId: string, id: string): Promise<ApiTokenRecord | null> {
  const row = await readable(trx, siteId).where('api_token.id', '=', id).executeTakeFirst();
  return row ? toRecord(row) : null;
}

export async function insertApiToken(
  trx: SiteTransaction,
  token: { siteId: string; name: string; tokenHash: string; scopes: readonly Scope[]; expiresAt: Date; createdBy: string },
): Promise<string> {
  const row = await trx
    .insertInto('api_token')
    .values({
      site_id: token.siteId,
      name: token.name,
      token_hash: token.tokenHash,
      scopes: [...token.scopes],
      expires_at: token.expiresAt,
      created_by: token.createdBy,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

/** @returns false when it was revoked before */
export async function revokeApiToken(trx: SiteTransaction, siteId: string, id: string, at: Date): Promise<boolean> {
  const result = await trx
    .updateTable('api_token')
    .set({ revoked_at: at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('revoked_at', 'is', null)
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

/** What a live token may do. */
export async function findTokenActor(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  now: Date,
): Promise<TokenActor | null> {
  const row = await trx
    .selectFrom('api_token')
    .select(['site_id', 'id', 'created_by', 'scopes'])
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('revoked_at', 'is', null)
    .where('expires_at', '>', now)
    .executeTakeFirst();
  if (!row) return null;
  return {
    kind: 'token',
    siteId: row.site_id,
    userId: row.created_by,
    tokenId: row.id,
    roles: [],
    scopes: row.scopes.filter(isScope),
  };
}

/** How many tokens a person has made that still work: they outlive the account on purpose, so leads are told. */
export async function countLiveTokensBy(
  trx: SiteTransaction,
  siteId: string,
  userId: string,
  now: Date,
): Promise<number> {
  const row = await trx
    .selectFrom('api_token')
    .select(sql<number>`count(*)::int`.as('live'))
    .where('site_id', '=', siteId)
    .where('created_by', '=', userId)
    .where('revoked_at', 'is', null)
    .where('expires_at', '>', now)
    .executeTakeFirstOrThrow();
  return row.live;
}
