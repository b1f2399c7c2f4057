import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { inTransaction } from '@/db/client';
import { ownerDatabase } from '@/tests/support/database';
import { fillSite } from '@/tests/support/database/fill-site';
import { tenantTables } from './tenant-tables';

/** Tables whose rows are never changed once written: what was measured, planned, signed, done and by whom. */
const APPEND_ONLY = [
  'audit_event',
  'booking_entry',
  'check_result',

  'keep_clear_request',
  'outcome',
  'plan_version',
  'protocol_version',
  'scanner_version',
  'sequence',
  'sign_off',
  'site_policy',
  'size_reading',
];

describe('what the application role may do', () => {
  it('is no superuser, does not bypass row-level security, makes no roles or databases and owns nothing', async () => {
    const { rows } = await sql`
      select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
        exists (select from pg_class where relowner = r.oid) as owns
      from pg_roles r where rolname = 'selvedge_app'`.execute(ownerDatabase());
    expect(rows).toEqual([
      { rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false, owns: false },
    ]);
  });

  it('is no member of the owner, the gate’s owner or the retention role', async () => {
    const { rows } = await sql<{ role: string }>`
      select rolname as role from pg_roles
      where rolname <> 'selvedge_app' and pg_has_role('selvedge_app', oid, 'member')`.execute(ownerDatabase());
    expect(rows).toEqual([]);
  });

  it('may only add to the tables that record what happened', async () => {
    const tables = await tenantTables(ownerDatabase());
    const appendOnly = tables.filter((table) => table.insertable && table.updatable.length === 0 && !table.deletable);
    expect(appendOnly.map(({ name }) => name)).toEqual(APPEND_ONLY);
  });

  it('may delete from no table but the staged rows of imports, and there only once the import is over', async () => {
    const tables = await tenantTables(ownerDatabase());
    expect(tables.filter(({ deletable }) => deletable).map(({ name }) => name)).toEqual(['import_row']);
    const { siteId } = await fillSite();
    const erase = () => inTransaction(siteId, async (trx) => (await sql`delete from import_row`.execute(trx)).numAffectedRows);
    expect(await erase(), 'of an import that goes on').toBe(0n);
    await inTransaction(siteId, (trx) => sql`update import_batch set status = 'committed'`.execute(trx));
    expect(await erase()).toBe(1n);
  });

  it.each(APPEND_ONLY)('is refused a change and a deletion in %s', async (table) => {
    const site = await fillSite();
    const change = inTransaction(site.siteId, (trx) => sql`update ${sql.table(table)} set site_id = site_id`.execute(trx));
    await expect(change).rejects.toThrow('permission denied');
    const removal = inTransaction(site.siteId, (trx) => sql`delete from ${sql.table(table)}`.execute(trx));
    await expect(removal).rejects.toThrow('permission denied');
  });

  it('cannot read the tables behind the gate, nor make anything of its own', async () => {
    const { siteId } = await fillSite();
    for (const statement of [
      'select * from gate.sign_in_identity',
      'select * from gate.sign_in_attempt',
      'create table public.mine ()',
      'create function gate.mine() returns int language sql as $$ select 1 $$',
      'set local role selvedge_gate',
      'set local role selvedge_owner',
    ]) {
      const attempt = inTransaction(siteId, (trx) => sql.raw(statement).execute(trx));
      await expect(attempt, statement).rejects.toThrow('permission denied');
    }
  });
});

it('leaves the owner no member of the gate’s role, whose policies let every site through', async () => {
  const { rows } = await sql<{ member: boolean }>`
    select pg_has_role('selvedge_owner', 'selvedge_gate', 'usage') as member`.execute(ownerDatabase());
  expect(rows).toEqual([{ member: false }]);
});

describe('what the retention role may do', () => {
  it('deletes a booking with its children and leaves a tombstone, in one site only', async () => {
    const mine = await fillSite();
    const theirs = await fillSite();
    await inTransaction(
      mine.siteId,
      async (trx) => {
        await sql`set local role selvedge_retention`.execute(trx);
        for (const table of ['size_request', 'check_result', 'move_proposal', 'booking_entry', 'plan_sheet', 'keep_clear_request', 'outcome', 'sign_off', 'plan_version', 'plan', 'size_reading', 'booking_state', 'booking']) {
          await sql`delete from ${sql.table(table)}`.execute(trx);
        }
        await trx
          .insertInto('booking_tombstone')
          .values({ site_id: mine.siteId, booking_id: mine.bookingId, reason: 'kept long enough' })
          .execute();
      },
      ownerDatabase(),
    );
    const bookings = (siteId: string) =>
      inTransaction(siteId, (trx) => trx.selectFrom('booking').select('id').execute());
    expect(await bookings(mine.siteId)).toEqual([]);
    expect(await bookings(theirs.siteId)).toEqual([{ id: theirs.bookingId }]);
    const tombstones = await inTransaction(mine.siteId, (trx) =>
      trx.selectFrom('booking_tombstone').select('booking_id').where('booking_id', '=', mine.bookingId).execute(),
    );
    expect(tombstones).toHaveLength(1);
  });

  it('reads neither people nor policy', async () => {
    const { siteId } = await fillSite();
    for (const table of ['app_user', 'site_policy', 'audit_event']) {
      const attempt = inTransaction(
        siteId,
        async (trx) => {
          await sql`set local role selvedge_retention`.execute(trx);
          await sql`select * from ${sql.table(table)}`.execute(trx);
        },
        ownerDatabase(),
      );
      await expect(attempt, table).rejects.toThrow('permission denied');
    }
  });
});
