import { type Kysely, sql } from 'kysely';

/**
 * Four roles, none a superuser, none above row-level security:
 * the owner migrates; `selvedge_app` serves; `selvedge_gate` owns the few functions that look before a site is known
 * and can never log in; `selvedge_retention` deletes bookings that are past their keeping time.
 * A role belongs to the whole cluster, so it may already be there (a second database, or the administrator made it).
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    do $$
    declare wanted text;
    begin
      foreach wanted in array array['selvedge_app', 'selvedge_gate', 'selvedge_retention'] loop
        if not exists (select from pg_roles where rolname = wanted) then
          begin
            execute format('create role %I nologin', wanted);
          exception when duplicate_object or unique_violation then
            null; -- another database of this cluster made it meanwhile
          end;
        end if;
      end loop;
      foreach wanted in array array['selvedge_gate', 'selvedge_retention'] loop
        if not pg_has_role(current_user, wanted, 'member') then
          execute format('grant %I to %I', wanted, current_user);
        end if;
      end loop;
    end $$`.execute(db);

  await sql`revoke all on schema public from public`.execute(db);
  await sql`grant usage on schema public to selvedge_app, selvedge_gate, selvedge_retention`.execute(db);
  await sql`create schema gate`.execute(db);
  await sql`grant usage on schema gate to selvedge_app, selvedge_gate`.execute(db);
}
