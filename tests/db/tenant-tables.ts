import { sql } from 'kysely';
import type { Database } from '@/db/client';

export interface TenantTable {
  readonly name: string;
  readonly enabled: boolean;
  readonly forced: boolean;
  /** The application's policy compares the site on reading (USING) and on writing (WITH CHECK). */
  readonly readChecked: boolean;
  readonly writeChecked: boolean;
  readonly insertable: boolean;
  /** Columns the application may update. */
  readonly updatable: readonly string[];
  readonly deletable: boolean;
}

export const siteColumn = (table: string) => (table === 'site' ? 'id' : 'site_id');

/** Every table with a site in it, as the catalogue has it. */
export async function tenantTables(db: Database): Promise<TenantTable[]> {
  const { rows } = await sql<TenantTable>`
    select t.relname as name, t.relrowsecurity as enabled, t.relforcerowsecurity as forced,
      bool_and(coalesce(pg_get_expr(p.polqual, p.polrelid) like '%app.site_id%', false)) as "readChecked",
      bool_and(coalesce(pg_get_expr(p.polwithcheck, p.polrelid) like '%app.site_id%', false)) as "writeChecked",
      has_table_privilege('selvedge_app', t.oid, 'insert') as insertable,
      has_table_privilege('selvedge_app', t.oid, 'delete') as deletable,
      array(
        select a.attname::text from pg_attribute a
        where a.attrelid = t.oid and a.attnum > 0 and not a.attisdropped
          and has_column_privilege('selvedge_app', t.oid, a.attnum, 'update')
        order by a.attnum
      ) as updatable
    from pg_class t
    -- Policies made for the gate alone are not the application's.
    left join pg_policy p on p.polrelid = t.oid and p.polroles = '{0}'
    where t.relnamespace = 'public'::regnamespace and t.relkind in ('r', 'p')
      and (t.relname = 'site' or exists (
        select from pg_attribute a where a.attrelid = t.oid and a.attname = 'site_id' and not a.attisdropped))
    group by t.oid, t.relname, t.relrowsecurity, t.relforcerowsecurity
    order by t.relname`.execute(db);
  return rows;
}
