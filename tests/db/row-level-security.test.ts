import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { beforeAll, describe, expect, it } from 'vitest';
import { database, inTransaction, type SiteTransaction } from '@/db/client';
import { ownerDatabase } from '@/tests/support/database';
import { type FilledSite, fillSite } from '@/tests/support/database/fill-site';
import { siteColumn, type TenantTable, tenantTables } from './tenant-tables';

/**
 * Read from the catalogue, so that a table added tomorrow is held to the same rules without being listed here.
 * Each test loops inside, because the tables are known only once the database is there.
 */
describe('row-level security', () => {
  let tables: TenantTable[];
  let mine: FilledSite;
  let theirs: FilledSite;

  beforeAll(async () => {
    tables = await tenantTables(ownerDatabase());
    mine = await fillSite();
    theirs = await fillSite();
  });

  const asApp = <T>(work: (trx: SiteTransaction) => Promise<T>) => inTransaction(mine.siteId, work);

  it('covers every table but the migrator’s own', async () => {
    const { rows } = await sql<{ name: string }>`
      select relname as name from pg_class
      where relnamespace = 'public'::regnamespace and relkind in ('r', 'p')
        and relname not like 'kysely\\_%'`.execute(ownerDatabase());
    expect(tables.map(({ name }) => name).sort()).toEqual(rows.map(({ name }) => name).sort());
    expect(tables.length).toBeGreaterThanOrEqual(20);
  });

  it('is forced on every tenant table, with a check on what is written', () => {
    for (const table of tables) {
      expect(table, table.name).toMatchObject({ enabled: true, forced: true, readChecked: true, writeChecked: true });
    }
  });

  it('starts every key, unique constraint and index with the site, except where the gate looks a secret up', async () => {
    const { rows } = await sql<{ index: string; first: string }>`
      select i.relname as index, a.attname as first
      from pg_index x
      join pg_class i on i.oid = x.indexrelid
      join pg_class t on t.oid = x.indrelid and t.relnamespace = 'public'::regnamespace
      join pg_attribute a on a.attrelid = t.oid and a.attnum = x.indkey[0]
      where t.relname not like 'kysely\\_%'`.execute(ownerDatabase());
    const elsewhere = rows.filter(({ first }) => first !== 'site_id').map(({ index }) => index);
    expect(elsewhere.sort()).toEqual(['api_token_hash', 'demonstration_share_hash', 'one_time_token_hash', 'site_pkey', 'size_request_hash']);
  });

  it('is tried on rows that are there: each of the two sites has a row in every table', async () => {
    for (const site of [mine, theirs]) {
      for (const { name } of tables) expect(await count(site.siteId, name), `${name} of ${site.siteId}`).toBeGreaterThan(0);
    }
  });

  it('shows no row of another site', async () => {
    for (const { name } of tables) {
      const foreign = await asApp(async (trx) => {
        const { rows } = await sql<{ n: string }>`
          select count(*) as n from ${sql.table(name)} where ${sql.ref(siteColumn(name))} <> ${mine.siteId}`.execute(trx);
        return Number(rows[0]?.n);
      });
      expect(foreign, name).toBe(0);
    }
  });

  it('shows nothing at all without a site', async () => {
    for (const { name } of tables) {
      const { rows } = await sql<{ n: string }>`select count(*) as n from ${sql.table(name)}`.execute(database());
      expect(Number(rows[0]?.n), name).toBe(0);
    }
  });

  it('refuses to write a row for another site', async () => {
    for (const { name, insertable } of tables) {
      if (!insertable) continue;
      // The other site's own row, with only its site id to tell it by: the check comes before any constraint.
      const attempt = asApp((trx) =>
        sql`insert into ${sql.table(name)} select (jsonb_populate_record(null::${sql.table(name)},
              ${JSON.stringify(theirs.rows[name])}::jsonb)).*`.execute(trx),
      );
      await expect(attempt, name).rejects.toThrow(/row-level security|permission denied/);
    }
  });

  it('changes no row of another site', async () => {
    for (const { name, updatable } of tables) {
      const column = updatable[0];
      if (!column) continue;
      const changed = await asApp(async (trx) => {
        const result = await sql`
          update ${sql.table(name)} set ${sql.ref(column)} = ${sql.ref(column)}
          where ${sql.ref(siteColumn(name))} = ${theirs.siteId}`.execute(trx);
        return Number(result.numAffectedRows);
      });
      expect(changed, name).toBe(0);
    }
  });

  it('does not let a row be moved to another site', async () => {
    const move = asApp((trx) =>
      trx.updateTable('scanner').set({ site_id: theirs.siteId }).where('site_id', '=', mine.siteId).execute(),
    );
    await expect(move).rejects.toThrow('row-level security');
  });

  it('holds the owner back as well', async () => {
    const { rows } = await sql<{ n: string }>`select count(*) as n from booking`.execute(ownerDatabase());
    expect(Number(rows[0]?.n)).toBe(0);
  });

  it('does not see a site that does not exist', async () => {
    expect(await inTransaction(randomUUID(), (trx) => trx.selectFrom('site').selectAll().execute())).toEqual([]);
  });

  async function count(siteId: string, table: string): Promise<number> {
    return inTransaction(siteId, async (trx) => {
      const { rows } = await sql<{ n: string }>`select count(*) as n from ${sql.table(table)}`.execute(trx);
      return Number(rows[0]?.n);
    });
  }
});
