import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { inTransaction, requireSchema } from '@/db/client';
import { migrationNames } from '@/db/client/migrate';
import { SCHEMA_VERSION } from '@/db/types/schema-version';
import { createTestSite, ownerDatabase } from '@/tests/support/database';

describe('inTransaction', () => {
  it('sets the site for the transaction and leaves nothing behind on the connection', async () => {
    const site = await createTestSite();
    const inside = await site.withApp(async (trx) => {
      const { rows } = await sql<{ site: string }>`select current_setting('app.site_id') as site`.execute(trx);
      return rows[0]?.site;
    });
    expect(inside).toBe(site.siteId);
    const { database } = await import('@/db/client');
    const { rows } = await sql<{ site: string | null }>`select current_setting('app.site_id', true) as site`.execute(database());
    expect(rows[0]?.site || null).toBeNull();
  });

  it.each(['', 'not-a-site', "' or true --"])('refuses %j as a site', async (siteId) => {
    await expect(inTransaction(siteId, async () => 1)).rejects.toThrow('needs the id of a site');
  });

  it('stores nothing of a transaction that fails', async () => {
    const site = await createTestSite();
    await expect(
      site.withApp(async (trx) => {
        await trx.insertInto('scanner').values({ site_id: site.siteId, name: 'Lost' }).execute();
        throw new Error('half-way');
      }),
    ).rejects.toThrow('half-way');
    expect(await site.withApp((trx) => trx.selectFrom('scanner').selectAll().execute())).toEqual([]);
  });
});

describe('requireSchema', () => {
  it('accepts the application role on the current schema', async () => {
    await expect(requireSchema()).resolves.toBeUndefined();
  });

  it('refuses the owner, whom row-level security might not hold back', async () => {
    await expect(requireSchema(ownerDatabase())).rejects.toThrow('selvedge_owner');
  });

  it('names the newest migration of this source tree', async () => {
    expect((await migrationNames()).at(-1)).toBe(SCHEMA_VERSION);
  });
});
