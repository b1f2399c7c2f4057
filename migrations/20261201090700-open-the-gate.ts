import { type Kysely, sql } from 'kysely';

/**
 * The only doors that work before a site is known. Each runs as a role that cannot log in, with a pinned search path,
 * and answers with ids, the site, an expiry and (for sign-in) the password hash: nothing a stranger could use.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  for (const table of ['public.app_user', 'public.one_time_token', 'public.api_token', 'public.mail_outbox']) {
    await sql`create policy gate_looks_up on ${sql.table(table)} for select to selvedge_gate using (true)`.execute(db);
  }
  await sql`grant select (site_id, id, email, password_hash, disabled_at) on app_user to selvedge_gate`.execute(db);
  await sql`
    grant select (site_id, id, kind, token_hash, user_id, expires_at, used_at) on one_time_token to selvedge_gate
  `.execute(db);
  await sql`grant select (site_id, id, token_hash, expires_at, revoked_at) on api_token to selvedge_gate`.execute(db);
  await sql`grant select (site_id, id, status, next_attempt_at) on mail_outbox to selvedge_gate`.execute(db);

  for (const table of ['gate.sign_in_identity', 'gate.sign_in_attempt']) {
    await sql`alter table ${sql.table(table)} enable row level security`.execute(db);
    await sql`alter table ${sql.table(table)} force row level security`.execute(db);
    await sql`
      create policy gate_only on ${sql.table(table)} to selvedge_gate using (true) with check (true)`.execute(db);
    await sql`grant select, insert, update, delete on ${sql.table(table)} to selvedge_gate`.execute(db);
  }

  await sql`
    create function gate.normalise_email(email text) returns text
      language sql immutable strict set search_path = pg_catalog, pg_temp
      as $$ select lower(normalize(btrim(email), NFKC)) $$`.execute(db);

  await sql`
    create function gate.keep_sign_in_identity() returns trigger
      language plpgsql security definer set search_path = pg_catalog, pg_temp
      as $$
      begin
        insert into gate.sign_in_identity (site_id, user_id, email_normalised)
          values (new.site_id, new.id, gate.normalise_email(new.email))
          on conflict (site_id, user_id) do update set email_normalised = excluded.email_normalised;
        return new;
      end $$`.execute(db);

  await sql`
    create function gate.resolve_sign_in(email text)
      returns table (site_id uuid, user_id uuid, password_hash text)
      language sql stable strict security definer rows 1 set search_path = pg_catalog, pg_temp
      as $$
        select u.site_id, u.id, u.password_hash
        from gate.sign_in_identity i
        join public.app_user u on u.site_id = i.site_id and u.id = i.user_id
        where i.email_normalised = gate.normalise_email(resolve_sign_in.email)
          and u.disabled_at is null
      $$`.execute(db);

  await sql`
    create function gate.resolve_token(kind text, hash text)
      returns table (site_id uuid, id uuid, expires_at timestamptz)
      language sql stable strict security definer rows 1 set search_path = pg_catalog, pg_temp
      as $$
        select t.site_id, t.id, t.expires_at
        from public.api_token t
        where resolve_token.kind = 'api' and t.token_hash = resolve_token.hash
          and t.revoked_at is null and t.expires_at > now()
        union all
        select t.site_id, t.id, t.expires_at
        from public.one_time_token t
        where t.kind = resolve_token.kind and t.token_hash = resolve_token.hash
          and t.used_at is null and t.expires_at > now()
      $$`.execute(db);
  // These two serve the gate, which does not know the site yet.
  await sql`create index api_token_hash on api_token (token_hash)`.execute(db);
  await sql`create index one_time_token_hash on one_time_token (token_hash)`.execute(db);

  await sql`
    create function gate.due_work(kind text, at_most integer)
      returns table (site_id uuid, id uuid)
      language sql stable strict security definer set search_path = pg_catalog, pg_temp
      as $$
        select m.site_id, m.id
        from public.mail_outbox m
        where due_work.kind = 'mail' and m.status = 'queued' and m.next_attempt_at <= now()
        order by m.next_attempt_at, m.id
        limit least(greatest(at_most, 0), 1000)
      $$`.execute(db);

  // Counted before the password is looked at, in one statement, so that parallel tries cannot slip through.
  await sql`
    create function gate.begin_sign_in(key_hash text) returns timestamptz
      language plpgsql strict security definer set search_path = pg_catalog, pg_temp
      as $$
      declare
        free_tries constant integer := 5;
        now_blocked timestamptz;
      begin
        insert into gate.sign_in_attempt as a (key_hash, tries, last_try_at, blocked_until)
          values (begin_sign_in.key_hash, 0, now(), '-infinity')
          on conflict do nothing;
        select case when a.blocked_until > now() then a.blocked_until end into now_blocked
          from gate.sign_in_attempt a where a.key_hash = begin_sign_in.key_hash for update;
        if now_blocked is not null then
          return now_blocked;
        end if;
        update gate.sign_in_attempt a
          set tries = case when a.last_try_at < now() - interval '1 hour' then 1 else a.tries + 1 end,
              last_try_at = now(),
              blocked_until = case
                when a.last_try_at < now() - interval '1 hour' or a.tries + 1 < free_tries then '-infinity'
                else now() + least(interval '15 minutes', interval '1 second' * power(2, least(a.tries + 1 - free_tries, 10)))
              end
          where a.key_hash = begin_sign_in.key_hash;
        return null;
      end $$`.execute(db);
  await sql`
    create function gate.forgive_sign_in(key_hash text) returns void
      language sql strict security definer set search_path = pg_catalog, pg_temp
      as $$ delete from gate.sign_in_attempt a where a.key_hash = forgive_sign_in.key_hash $$`.execute(db);

  await sql`grant create on schema gate to selvedge_gate`.execute(db);
  for (const signature of [
    'keep_sign_in_identity()',
    'resolve_sign_in(text)',
    'resolve_token(text, text)',
    'due_work(text, integer)',
    'begin_sign_in(text)',
    'forgive_sign_in(text)',
    'normalise_email(text)',
  ]) {
    const name = sql.raw(`gate.${signature}`);
    await sql`revoke all on function ${name} from public`.execute(db);
    await sql`alter function ${name} owner to selvedge_gate`.execute(db);
    if (signature !== 'keep_sign_in_identity()') {
      await sql`grant execute on function ${name} to selvedge_app`.execute(db);
    }
  }
  await sql`revoke create on schema gate from selvedge_gate`.execute(db);

  await sql`
    do $$ begin
      execute format('grant execute on function gate.keep_sign_in_identity() to %I', current_user);
    end $$`.execute(db);
  await sql`
    create trigger keep_sign_in_identity after insert or update of email on app_user
      for each row execute function gate.keep_sign_in_identity()`.execute(db);

  // A member of the gate's role would see every site through the gate's policies: the owner must not stay one.
  await sql`do $$ begin execute format('revoke selvedge_gate from %I', current_user); end $$`.execute(db);
}
