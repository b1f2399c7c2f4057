import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { ROLES } from '@/lib/domain/access';
import { disablePerson } from '@/lib/services/people/disable-person';
import { editPerson } from '@/lib/services/people/edit-person';
import { enablePerson } from '@/lib/services/people/enable-person';
import { invitePerson } from '@/lib/services/people/invite-person';
import { listPeople } from '@/lib/services/people/list-people';
import { loadPerson } from '@/lib/services/people/load-person';
import { resendInvitation } from '@/lib/services/people/resend-invitation';
import { signOutPerson } from '@/lib/services/people/sign-out-person';
import { passwordLink } from '@/lib/services/session/password-link';
import { setPassword } from '@/lib/services/session/set-password';
import { verifySignIn } from '@/lib/services/session/verify-sign-in';
import { createTestSite, type TestSite } from '@/tests/support/database';
import { activePerson, auditActions, outcomeOf, PASSWORD, readAccount } from '@/tests/support/database/accounts';

const newcomer = (over: object = {}) => ({
  email: `${randomUUID()}@people.example`,
  displayName: 'Nova Ply',
  roles: ['educator' as const, 'radiographer' as const],
  ...over,
});

async function invitationsTo(site: TestSite, userId: string): Promise<string[]> {
  const rows = await site.withApp((trx) =>
    trx.selectFrom('mail_outbox').select('id').where('site_id', '=', site.siteId).where('to_user_id', '=', userId).orderBy('created_at').execute(),
  );
  return rows.map((row) => new URL(passwordLink(row.id)).hash.slice(1));
}

async function siteWithLead() {
  const site = await createTestSite();
  return { site, lead: await activePerson(site, 'lead') };
}

describe('inviting', () => {
  it('makes the account, the mail and the log line together, and the link makes it work', async () => {
    const { site, lead } = await siteWithLead();
    const invited = newcomer();
    const { id } = await invitePerson({ actor: lead }, invited);
    expect(await loadPerson({ actor: lead }, { id })).toMatchObject({
      email: invited.email,
      status: 'invited',
      roles: ['radiographer', 'educator'],
    });
    expect(await auditActions(site, id)).toEqual(['person.invite']);
    const [token] = await invitationsTo(site, id);
    await setPassword({ token: token!, newPassword: PASSWORD, repeatPassword: PASSWORD });
    await verifySignIn({ email: invited.email, password: PASSWORD, address: randomUUID() });
    expect(await loadPerson({ actor: lead }, { id })).toMatchObject({ status: 'active' });
  });

  it('says who has the address already, and refuses one of another site without saying so', async () => {
    const [here, there] = [await siteWithLead(), await siteWithLead()];
    const invited = newcomer();
    await invitePerson({ actor: here.lead }, invited);
    const again = { ...invited, email: ` ${invited.email.toUpperCase()} ` };
    expect(await outcomeOf(invitePerson({ actor: here.lead }, again))).toMatch(/belongs to Nova Ply, who is invited/);
    const elsewhere = await outcomeOf(invitePerson({ actor: there.lead }, invited));
    expect(elsewhere).toMatch(/email.*cannot be invited/);
    expect(elsewhere).not.toMatch(/site|Nova|exist|account/i);
    expect(await listPeople({ actor: there.lead })).toHaveLength(1);
  });

  it.each([
    ['an address without an @', { email: 'nova' }, /email/],
    ['no role', { roles: [] }, /roles/],
    ['a role of nobody', { roles: ['owner'] }, /roles/],
    ['no name', { displayName: '   ' }, /displayName/],
  ])('refuses %s beside its control and stores nothing', async (_, over, field) => {
    const { lead } = await siteWithLead();
    expect(await outcomeOf(invitePerson({ actor: lead }, newcomer(over)))).toMatch(field);
    expect(await listPeople({ actor: lead })).toHaveLength(1);
  });

  it('sends again to the invited only, and the earlier link ends', async () => {
    const { site, lead } = await siteWithLead();
    const { id } = await invitePerson({ actor: lead }, newcomer());
    await resendInvitation({ actor: lead }, { id });
    const [first, second] = await invitationsTo(site, id);
    expect(await outcomeOf(setPassword({ token: first!, newPassword: PASSWORD, repeatPassword: PASSWORD }))).toMatch(/^gone/);
    await setPassword({ token: second!, newPassword: PASSWORD, repeatPassword: PASSWORD });
    expect(await outcomeOf(resendInvitation({ actor: lead }, { id }))).toMatch(/^conflict/);
  });
});

describe('editing', () => {
  it('changes name and roles, once per version, and logs which fields', async () => {
    const { site, lead } = await siteWithLead();
    const person = await activePerson(site, 'radiographer');
    const change = { id: person.userId, version: 1, displayName: 'Robin Ply', roles: ['coordinator' as const, 'radiographer' as const] };
    expect(await editPerson({ actor: lead }, change)).toEqual({ version: 2 });
    expect(await outcomeOf(editPerson({ actor: lead }, { ...change, displayName: 'Late' }))).toMatch(/^conflict/);
    expect(await loadPerson({ actor: lead }, { id: person.userId })).toMatchObject({
      displayName: 'Robin Ply',
      roles: ['radiographer', 'coordinator'],
    });
    const fields = await site.withApp((trx) =>
      trx.selectFrom('audit_event').select('fields').where('site_id', '=', site.siteId).where('subject_id', '=', person.userId).execute(),
    );
    expect(fields).toEqual([{ fields: ['displayName', 'roles'] }]);
  });

  it('logs nothing when nothing changes', async () => {
    const { site, lead } = await siteWithLead();
    const same = { id: lead.userId, version: 1, displayName: lead.displayName, roles: [...lead.roles] };
    expect(await editPerson({ actor: lead }, same)).toEqual({ version: 1 });
    expect(await auditActions(site, lead.userId)).toEqual([]);
  });

  it('lets exactly one of two simultaneous edits win', async () => {
    const { site, lead } = await siteWithLead();
    const person = await activePerson(site, 'radiographer');
    const edit = (displayName: string) =>
      outcomeOf(editPerson({ actor: lead }, { id: person.userId, version: 1, displayName, roles: ['radiographer'] }));
    const outcomes = await Promise.all([edit('One'), edit('Two')]);
    expect(outcomes.filter((outcome) => outcome === 'done')).toHaveLength(1);
    expect(outcomes.filter((outcome) => outcome.startsWith('conflict'))).toHaveLength(1);
  });
});

describe('the last lead', () => {
  const demote = (actor: Awaited<ReturnType<typeof activePerson>>, of: { userId: string; displayName: string }) =>
    outcomeOf(editPerson({ actor }, { id: of.userId, version: 1, displayName: of.displayName, roles: ['educator'] }));

  it('can neither be disabled nor lose the role, not even by themselves', async () => {
    const { site, lead } = await siteWithLead();
    await site.person('lead'); // invited, no password: cannot sign in and does not count
    expect(await demote(lead, lead)).toMatch(/^invalid.*only lead/);
    expect(await outcomeOf(disablePerson({ actor: lead }, { id: lead.userId }))).toMatch(/^invalid.*only lead/);
    expect(await readAccount(site, lead.userId)).toMatchObject({ roles: ['lead'], disabled_at: null });
  });

  it('can when another lead is there, who then is the last', async () => {
    const { site, lead } = await siteWithLead();
    const second = await activePerson(site, 'lead');
    expect(await demote(second, lead)).toBe('done');
    expect(await outcomeOf(disablePerson({ actor: second }, { id: second.userId }))).toMatch(/only lead/);
  });

  it('remains when two leads remove each other at the same moment', async () => {
    for (let round = 1; round <= 5; round++) {
      const { site, lead } = await siteWithLead();
      const second = await activePerson(site, 'lead');
      const outcomes = await Promise.all([
        outcomeOf(disablePerson({ actor: lead }, { id: second.userId })),
        demote(second, lead),
      ]);
      expect(outcomes.filter((outcome) => outcome === 'done'), outcomes.join(' / ')).toHaveLength(1);
      const leads = (await Promise.all([readAccount(site, lead.userId), readAccount(site, second.userId)])).filter(
        (account) => account.roles.includes('lead') && account.disabled_at === null,
      );
      expect(leads).toHaveLength(1);
    }
  });
});

describe('disabling', () => {
  it('ends sign-in, sessions and mailed links, and can be undone', async () => {
    const { site, lead } = await siteWithLead();
    const { id } = await invitePerson({ actor: lead }, newcomer());
    const [token] = await invitationsTo(site, id);
    await disablePerson({ actor: lead }, { id });
    expect(await outcomeOf(setPassword({ token: token!, newPassword: PASSWORD, repeatPassword: PASSWORD }))).toMatch(/^gone/);
    await enablePerson({ actor: lead }, { id });
    expect(await outcomeOf(setPassword({ token: token!, newPassword: PASSWORD, repeatPassword: PASSWORD }))).toMatch(/^gone/);

    const person = await activePerson(site, 'radiographer');
    await disablePerson({ actor: lead }, { id: person.userId });
    expect((await readAccount(site, person.userId)).session_epoch).toBe(2);
    await enablePerson({ actor: lead }, { id: person.userId });
    const account = await verifySignIn({ email: person.email, password: PASSWORD, address: randomUUID() });
    expect(account.sessionEpoch).toBe(3);
    expect(await auditActions(site, person.userId)).toEqual(['person.disable', 'person.disable', 'account.sign-in']);
  });

  it('signs a person out everywhere without disabling them', async () => {
    const { site, lead } = await siteWithLead();
    const person = await activePerson(site, 'radiographer');
    await signOutPerson({ actor: lead }, { id: person.userId });
    expect(await readAccount(site, person.userId)).toMatchObject({ session_epoch: 2, disabled_at: null });
  });
});

describe('who may', () => {
  const uses = (id: string) => ({
    list: (context: { actor: never }) => listPeople(context),
    load: (context: { actor: never }) => loadPerson(context, { id }),
    invite: (context: { actor: never }) => invitePerson(context, newcomer()),
    edit: (context: { actor: never }) => editPerson(context, { id, version: 1, displayName: 'Taken over', roles: ['lead'] }),
    disable: (context: { actor: never }) => disablePerson(context, { id }),
    enable: (context: { actor: never }) => enablePerson(context, { id }),
    signOut: (context: { actor: never }) => signOutPerson(context, { id }),
    resend: (context: { actor: never }) => resendInvitation(context, { id }),
  });
  const NOT_FOUND = /^not-found \| There is nothing here/;

  it('no other role, no token and no worker; leads may', async () => {
    const { site, lead } = await siteWithLead();
    const target = await site.person('radiographer');
    const before = await readAccount(site, target.userId);
    const token = { kind: 'token', siteId: site.siteId, userId: lead.userId, tokenId: randomUUID(), roles: [], scopes: ['bookings:write'] };
    const system = { kind: 'system', siteId: site.siteId, userId: null, job: 'mail', roles: [] };
    const strangers = [await activePerson(site, ...ROLES.filter((role) => role !== 'lead')), await activePerson(site), token, system];
    for (const actor of strangers) {
      for (const [name, use] of Object.entries(uses(target.userId))) {
        expect(await outcomeOf(use({ actor: actor as never })), name).toMatch(NOT_FOUND);
      }
    }
    expect(await readAccount(site, target.userId)).toEqual(before);
    for (const [name, use] of Object.entries(uses(target.userId))) {
      expect(await outcomeOf(use({ actor: lead as never })), name).not.toMatch(NOT_FOUND);
    }
  });

  it('not the lead of another site: a person there is as good as missing', async () => {
    const [here, there] = [await siteWithLead(), await siteWithLead()];
    const before = await readAccount(there.site, there.lead.userId);
    const { list: _list, invite: _invite, ...onOne } = uses(there.lead.userId);
    for (const [name, use] of Object.entries(onOne)) {
      const foreign = await outcomeOf(use({ actor: here.lead as never }));
      const missing = await outcomeOf(uses(randomUUID())[name as 'load']({ actor: here.lead as never }));
      expect(foreign, name).toMatch(NOT_FOUND);
      expect(foreign, name).toBe(missing);
    }
    expect(await readAccount(there.site, there.lead.userId)).toEqual(before);
    expect((await listPeople({ actor: here.lead })).map((person) => person.id)).toEqual([here.lead.userId]);
  });
});
