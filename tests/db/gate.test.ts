import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { beginSignIn, dueWork, forgiveSignIn, inTransaction, resolveSignIn, resolveToken } from '@/db/client';
import { createTestSite, ownerDatabase } from '@/tests/support/database';
import { fillSite } from '@/tests/support/database/fill-site';

describe('the gate', () => {
  it('has exactly these functions, pinned, owned by a role that cannot log in', async () => {
    const { rows } = await sql<{ signature: string; definer: boolean; pinned: boolean; owner: string; login: boolean }>`
      select p.oid::regprocedure::text as signature, p.prosecdef as definer,
        coalesce('search_path=pg_catalog, pg_temp' = any (p.proconfig), false) as pinned,
        r.rolname as owner, r.rolcanlogin or r.rolsuper or r.rolbypassrls as login
      from pg_proc p join pg_roles r on r.oid = p.proowner
      where p.pronamespace = 'gate'::regnamespace order by 1`.execute(ownerDatabase());
    const definer = (signature: string) => ({
      signature: `gate.${signature}`,
      definer: true,
      pinned: true,
      owner: 'selvedge_gate',
      login: false,
    });
    expect(rows).toEqual([
      definer('begin_sign_in(text)'),
      definer('due_work(text,integer)'),
      definer('forgive_sign_in(text)'),
      definer('keep_sign_in_identity()'),
      { ...definer('normalise_email(text)'), definer: false },
      definer('resolve_sign_in(text)'),
      definer('resolve_token(text,text)'),
    ]);
  });

  it('has no other function that runs with its owner’s rights anywhere in the application’s schemas', async () => {
    const { rows } = await sql`
      select p.oid::regprocedure::text from pg_proc p
      where p.prosecdef and p.pronamespace not in ('gate'::regnamespace, 'pg_catalog'::regnamespace)`.execute(ownerDatabase());
    expect(rows).toEqual([]);
  });

  it('is shut to everyone but the application', async () => {
    const { rows } = await sql<{ signature: string }>`
      select p.oid::regprocedure::text as signature from pg_proc p
      where p.pronamespace = 'gate'::regnamespace
        and exists (select from aclexplode(p.proacl) a where a.grantee = 0)`.execute(ownerDatabase());
    expect(rows).toEqual([]);
  });

  describe('resolve_sign_in', () => {
    it('finds an account by its address however it is typed', async () => {
      const site = await createTestSite();
      const email = `Ada.${randomUUID()}@People.Example`;
      await site.withApp((trx) =>
        trx
          .insertInto('app_user')
          .values({ site_id: site.siteId, email, display_name: 'Ada', roles: ['lead'], password_hash: 'hash' })
          .execute(),
      );
      expect(await resolveSignIn(`  ${email.toUpperCase()} `)).toMatchObject({ siteId: site.siteId, passwordHash: 'hash' });
      expect(await resolveSignIn('nobody@people.example')).toBeNull();
    });

    it('follows a changed address and forgets a disabled account', async () => {
      const site = await createTestSite();
      const person = await site.person('lead');
      const before = `${person.userId}@people.example`;
      const after = `${randomUUID()}@people.example`;
      const change = (values: { email?: string; disabled_at?: Date }) =>
        site.withApp((trx) =>
          trx.updateTable('app_user').set(values).where('site_id', '=', site.siteId).where('id', '=', person.userId).execute(),
        );
      await change({ email: after });
      expect(await resolveSignIn(before)).toBeNull();
      expect(await resolveSignIn(after)).toMatchObject({ userId: person.userId });
      await change({ disabled_at: new Date() });
      expect(await resolveSignIn(after)).toBeNull();
    });

    it('keeps one address to one site', async () => {
      const [one, two] = [await createTestSite(), await createTestSite()];
      const email = `${randomUUID()}@people.example`;
      const add = (site: typeof one) =>
        site.withApp((trx) =>
          trx.insertInto('app_user').values({ site_id: site.siteId, email, display_name: 'Twice', roles: [] }).execute(),
        );
      await add(one);
      await expect(add(two)).rejects.toMatchObject({ code: '23505' });
    });
  });

  describe('resolve_token', () => {
    it('finds a token by kind and hash, and nothing when the kind is another', async () => {
      const { siteId } = await fillSite();
      expect(await resolveToken('set-password', `t-${siteId}`)).toMatchObject({ siteId });
      expect(await resolveToken('api', `a-${siteId}`)).toMatchObject({ siteId });
      expect(await resolveToken('api', `t-${siteId}`)).toBeNull();
      expect(await resolveToken('set-password', `a-${siteId}`)).toBeNull();
    });

    it('does not find what is used, revoked or expired', async () => {
      const { siteId, userId } = await fillSite();
      await inTransaction(siteId, async (trx) => {
        await trx.updateTable('one_time_token').set({ used_at: new Date() }).where('site_id', '=', siteId).execute();
        await trx.updateTable('api_token').set({ revoked_at: new Date() }).where('site_id', '=', siteId).execute();
        await trx
          .insertInto('api_token')
          .values({
            site_id: siteId,
            name: 'Old',
            token_hash: `old-${siteId}`,
            scopes: [],
            expires_at: new Date('2020-01-01T00:00:00Z'),
            created_by: userId,
          })
          .execute();
      });
      expect(await resolveToken('set-password', `t-${siteId}`)).toBeNull();
      expect(await resolveToken('api', `a-${siteId}`)).toBeNull();
      expect(await resolveToken('api', `old-${siteId}`)).toBeNull();
    });
  });

  it('lists queued mail that is due, by site and id only', async () => {
    const { siteId } = await fillSite();
    const mine = (await dueWork('mail', 1000)).filter((work) => work.siteId === siteId);
    expect(mine).toHaveLength(1);
    await inTransaction(siteId, (trx) =>
      trx.updateTable('mail_outbox').set({ next_attempt_at: new Date('2100-01-01T00:00:00Z') }).where('site_id', '=', siteId).execute(),
    );
    expect((await dueWork('mail', 1000)).filter((work) => work.siteId === siteId)).toEqual([]);
  });

  describe('begin_sign_in', () => {
    it('lets five tries through, then blocks for longer and longer, and forgives after a success', async () => {
      const key = randomUUID();
      for (let attempt = 1; attempt <= 5; attempt++) expect(await beginSignIn(key), `try ${attempt}`).toBeNull();
      const blocked = await beginSignIn(key);
      expect(blocked).toBeInstanceOf(Date);
      // Further tries while blocked do not lengthen the block: someone else's guesses cannot lock a person out for good.
      expect(await beginSignIn(key)).toEqual(blocked);
      expect(await beginSignIn(randomUUID())).toBeNull();
      await forgiveSignIn(key);
      expect(await beginSignIn(key)).toBeNull();
    });

    it('counts tries that come at the same moment', async () => {
      const key = randomUUID();
      const answers = await Promise.all(Array.from({ length: 20 }, () => beginSignIn(key)));
      expect(answers.filter((answer) => answer === null)).toHaveLength(5);
    });
  });
});
