import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { readSceneDocument, type Scene, type SceneDocument } from '@/lib/domain/demonstration/scene';

export interface DemonstrationRecord {
  readonly siteId: string;
  readonly id: string;
  readonly title: string;
  readonly version: number;
  readonly putAway: boolean;
}

export interface DemonstrationSummary extends DemonstrationRecord {
  readonly changedAt: Date;
  readonly scenes: number;
  readonly links: number;
}

/** More than a department makes in years; the page says when it shows the newest only. */
export const DEMONSTRATIONS_SHOWN = 200;

export async function listDemonstrations(trx: SiteTransaction, siteId: string, now: Date, putAway = false): Promise<DemonstrationSummary[]> {
  const rows = await trx
    .selectFrom('demonstration as d')
    .select(['d.site_id', 'd.id', 'd.title', 'd.version', 'd.changed_at'])
    .select((eb) => [
      eb
        .selectFrom('scene as s')
        .select(sql<number>`count(*)::int`.as('n'))
        .whereRef('s.site_id', '=', 'd.site_id')
        .whereRef('s.demonstration_id', '=', 'd.id')
        .where('s.removed', '=', 0)
        .as('scenes'),
      eb
        .selectFrom('demonstration_share as l')
        .select(sql<number>`count(*)::int`.as('n'))
        .whereRef('l.site_id', '=', 'd.site_id')
        .whereRef('l.demonstration_id', '=', 'd.id')
        .where('l.revoked_at', 'is', null)
        .where('l.expires_at', '>', now)
        .as('links'),
    ])
    .where('d.site_id', '=', siteId)
    .where('d.put_away', '=', putAway ? 1 : 0)
    .orderBy('d.changed_at', 'desc')
    .orderBy('d.id', 'desc')
    .limit(DEMONSTRATIONS_SHOWN)
    .execute();
  return rows.map((row) => ({
    siteId: row.site_id,
    id: row.id,
    title: row.title,
    version: row.version,
    putAway,
    changedAt: row.changed_at,
    scenes: row.scenes ?? 0,
    links: row.links ?? 0,
  }));
}

/** What is put away is found by those only who bring it back. */
export async function findDemonstration(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  options: { readonly forUpdate?: boolean; readonly putAwayToo?: boolean } = {},
): Promise<DemonstrationRecord | null> {
  const row = await trx
    .selectFrom('demonstration')
    .select(['site_id', 'id', 'title', 'version', 'put_away'])
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .$if(options.putAwayToo !== true, (query) => query.where('put_away', '=', 0))
    .$if(options.forUpdate === true, (query) => query.forUpdate())
    .executeTakeFirst();
  return row ? { siteId: row.site_id, id: row.id, title: row.title, version: row.version, putAway: row.put_away === 1 } : null;
}

export async function insertDemonstration(
  trx: SiteTransaction,
  demonstration: { siteId: string; title: string; createdBy: string },
): Promise<string> {
  const row = await trx
    .insertInto('demonstration')
    .values({ site_id: demonstration.siteId, title: demonstration.title, created_by: demonstration.createdBy })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

/** The next version, under the row's lock. */
export async function changeDemonstration(
  trx: SiteTransaction,
  { siteId, id, version }: DemonstrationRecord,
  title: string,
  at: Date,
): Promise<number> {
  await trx
    .updateTable('demonstration')
    .set({ title, version: version + 1, changed_at: at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
  return version + 1;
}

export async function setPutAway(trx: SiteTransaction, siteId: string, id: string, putAway: boolean, at: Date): Promise<void> {
  await trx
    .updateTable('demonstration')
    .set({ put_away: putAway ? 1 : 0, changed_at: at })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** In their order, without those taken out. */
export async function listScenes(trx: SiteTransaction, siteId: string, demonstrationId: string): Promise<Scene[]> {
  const rows = await trx
    .selectFrom('scene')
    .select(['id', 'data'])
    .where('site_id', '=', siteId)
    .where('demonstration_id', '=', demonstrationId)
    .where('removed', '=', 0)
    .orderBy('position')
    .orderBy('id')
    .execute();
  return rows.map(({ id, data }) => ({ id, ...readSceneDocument(data) }));
}

/** Ids of all scenes ever in it, and of the same ids anywhere else at the site. */
export async function findSceneOwners(
  trx: SiteTransaction,
  siteId: string,
  ids: readonly string[],
): Promise<ReadonlyMap<string, string>> {
  if (ids.length === 0) return new Map();
  const rows = await trx
    .selectFrom('scene')
    .select(['id', 'demonstration_id'])
    .where('site_id', '=', siteId)
    .where('id', 'in', [...ids])
    .execute();
  return new Map(rows.map((row) => [row.id, row.demonstration_id]));
}

export async function putScene(
  trx: SiteTransaction,
  place: { readonly siteId: string; readonly demonstrationId: string; readonly id: string; readonly position: number },
  document: SceneDocument,
): Promise<void> {
  const data = JSON.stringify(document);
  await trx
    .insertInto('scene')
    .values({ site_id: place.siteId, id: place.id, demonstration_id: place.demonstrationId, position: place.position, data })
    .onConflict((conflict) =>
      conflict.columns(['site_id', 'id']).doUpdateSet({ position: place.position, removed: 0, data }),
    )
    .execute();
}

export async function removeScenes(trx: SiteTransaction, siteId: string, demonstrationId: string, ids: readonly string[]): Promise<void> {
  if (ids.length === 0) return;
  await trx
    .updateTable('scene')
    .set({ removed: 1 })
    .where('site_id', '=', siteId)
    .where('demonstration_id', '=', demonstrationId)
    .where('id', 'in', [...ids])
    .execute();
}
