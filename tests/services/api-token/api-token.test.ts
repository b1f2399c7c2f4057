import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { ROLES } from '@/lib/domain/access';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import { listApiTokens } from '@/lib/services/api-token/list-api-tokens';
import { revokeApiToken } from '@/lib/services/api-token/revoke-api-token';
import { loadPerson } from '@/lib/services/people/load-person';
import { resolveTokenActor } from '@/lib/services/session/resolve-token-actor';
import { createTestSite } from '@/tests/support/database';
import { activePerson, auditActions, outcomeOf } from '@/tests/support/database/accounts';

const wanted = { name: 'Booking system', scopes: ['plans:read' as const, 'check:run' as const], days: 30 };
const DAY = 86_400_000;

async function siteWithLead() {
  const site = await createTestSite();
  return { site, lead: await activePerson(site, 'lead') };
}

describe('an API token', () => {
  it('acts for its site within its scopes; only its hash is stored', async () => {
    const { site, lead } = await siteWithLead();
    const { id, secret } = await createApiToken({ actor: lead }, wanted);
    expect(secret).toMatch(/^selvedge_[\w-]{43}$/);
    expect(await resolveTokenActor(secret)).toEqual({
      kind: 'token',
      siteId: site.siteId,
      userId: lead.userId,
      tokenId: id,
      roles: [],
      scopes: ['check:run', 'plans:read'],
    });
    const dump = await site.withApp((trx) => sql`select to_jsonb(t)::text from api_token t`.execute(trx));
    expect(JSON.stringify(dump.rows)).not.toContain(secret);
    expect(JSON.stringify(await listApiTokens({ actor: lead }))).not.toContain(secret);
    expect(await auditActions(site, id)).toEqual(['api-token.create']);
  });

  it('is unknown once revoked, while its neighbour goes on', async () => {
    const { site, lead } = await siteWithLead();
    const [one, two] = [await createApiToken({ actor: lead }, wanted), await createApiToken({ actor: lead }, wanted)];
    await revokeApiToken({ actor: lead }, { id: one.id });
    await revokeApiToken({ actor: lead }, { id: one.id });
    expect(await resolveTokenActor(one.secret)).toBeNull();
    expect(await resolveTokenActor(two.secret)).not.toBeNull();
    expect(await auditActions(site, one.id)).toEqual(['api-token.create', 'api-token.revoke']);
  });

  it('is unknown once expired, and not a moment earlier', async () => {
    const { lead } = await siteWithLead();
    const made = new Date();
    const { secret, expiresAt } = await createApiToken({ actor: lead, now: made }, { ...wanted, days: 1 });
    expect(await resolveTokenActor(secret, new Date(expiresAt.getTime() - 1))).not.toBeNull();
    expect(await resolveTokenActor(secret, expiresAt)).toBeNull();
    // The database's own clock refuses it too.
    const old = await createApiToken({ actor: lead, now: new Date(made.getTime() - 2 * DAY) }, { ...wanted, days: 1 });
    expect(await resolveTokenActor(old.secret, new Date(made.getTime() - 2 * DAY))).toBeNull();
    expect((await listApiTokens({ actor: lead })).map((token) => token.state).sort()).toEqual(['expired', 'works']);
  });

  it('is not found by anything like it', async () => {
    const { lead } = await siteWithLead();
    const { secret } = await createApiToken({ actor: lead }, wanted);
    const near = ['', 'selvedge_', secret.slice(0, -1), `${secret}A`, secret.toLowerCase(), ` ${secret}`, `${secret}\u0000`, '%', '*'];
    for (const text of near) expect(await resolveTokenActor(text), text).toBeNull();
    expect(await resolveTokenActor(secret)).not.toBeNull();
  });

  it('outlives its maker’s account, and leads are told', async () => {
    const { lead } = await siteWithLead();
    await createApiToken({ actor: lead }, wanted);
    const revoked = await createApiToken({ actor: lead }, wanted);
    await revokeApiToken({ actor: lead }, { id: revoked.id });
    expect(await loadPerson({ actor: lead }, { id: lead.userId })).toMatchObject({ liveTokens: 1 });
  });

  it.each([
    ['no name', { name: ' ' }, /name/],
    ['no scope', { scopes: [] }, /scopes/],
    ['a scope that is none', { scopes: ['everything'] }, /scopes/],
    ['more than a year', { days: 367 }, /days/],
    ['no time at all', { days: 0 }, /days/],
  ])('is refused with %s', async (_, over, field) => {
    const { lead } = await siteWithLead();
    expect(await outcomeOf(createApiToken({ actor: lead }, { ...wanted, ...over } as never))).toMatch(field);
    expect(await listApiTokens({ actor: lead })).toEqual([]);
  });
});

describe('who may make and revoke tokens', () => {
  it('leads of the site; no other role, no token, no lead of another site', async () => {
    const [{ site, lead }, other] = [await siteWithLead(), await siteWithLead()];
    const { id, secret } = await createApiToken({ actor: lead }, wanted);
    const others = await activePerson(site, ...ROLES.filter((role) => role !== 'lead'));
    const machine = (await resolveTokenActor(secret))!;
    for (const actor of [others, machine]) {
      expect(await outcomeOf(listApiTokens({ actor }))).toMatch(/^not-found/);
      expect(await outcomeOf(createApiToken({ actor }, wanted))).toMatch(/^not-found/);
      expect(await outcomeOf(revokeApiToken({ actor }, { id }))).toMatch(/^not-found/);
    }
    const foreign = await outcomeOf(revokeApiToken({ actor: other.lead }, { id }));
    expect(foreign).toBe(await outcomeOf(revokeApiToken({ actor: other.lead }, { id: randomUUID() })));
    expect(await listApiTokens({ actor: other.lead })).toEqual([]);
    expect(await resolveTokenActor(secret)).not.toBeNull();
  });
});
