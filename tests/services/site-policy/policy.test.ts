import { describe, expect, it } from 'vitest';
import { getPolicy } from '@/lib/services/site-policy/get-policy';
import { editPolicy } from '@/lib/services/site-policy/edit-policy';
import { editSite } from '@/lib/services/site/edit-site';
import { getSite } from '@/lib/services/site/get-site';
import { createTestSite } from '@/tests/support/database';
import { as, policyForm } from '@/tests/support/equipped-site';

describe('the site policy', () => {
  it('is the standard one, as version 0, until a lead writes the first', async () => {
    const site = await createTestSite();
    const lead = await site.person('lead');
    expect(await getPolicy(as(lead))).toMatchObject({ version: 0, policy: { version: 0, sureAt: 0.95 } });
    const form = { ...policyForm(), sureAt: 0.9 };
    expect(await editPolicy(as(lead), { expectedVersion: 0, form })).toMatchObject({ version: 1, policy: { version: 1, sureAt: 0.9 } });
    expect(await editPolicy(as(lead), { expectedVersion: 1, form })).toMatchObject({ version: 1 });
    const [event] = await site.withApp((trx) => trx.selectFrom('audit_event').selectAll().where('action', '=', 'policy.edit').execute());
    expect(event).toMatchObject({ subject_id: site.siteId, fields: ['sureAt'] });
  });

  it('holds the true flip of presaturation bands once it was measured, and not when it is taken back', async () => {
    const site = await createTestSite();
    const lead = await site.person('lead');
    const { policy } = await editPolicy(as(lead), { expectedVersion: 0, form: { ...policyForm(), presaturationB1Scale: 0.9 } });
    expect(policy.presaturationB1Scale).toBe(0.9);
    expect((await editPolicy(as(lead), { expectedVersion: 1, form: policyForm() })).policy).not.toHaveProperty('presaturationB1Scale');
    await expect(editPolicy(as(lead), { expectedVersion: 2, form: { ...policyForm(), presaturationB1Scale: 0.1 } })).rejects.toMatchObject({
      fields: { 'form.presaturationB1Scale': '0.1 given; allowed: a number, 0.3 to 2' },
    });
  });

  it('of two edits of one version, one wins and the other is told', async () => {
    const site = await createTestSite();
    const lead = await site.person('lead');
    const edit = (sureAt: number) => editPolicy(as(lead), { expectedVersion: 0, form: { ...policyForm(), sureAt } });
    const outcomes = await Promise.allSettled([edit(0.8), edit(0.85)]);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    await expect(edit(0.7)).rejects.toMatchObject({ code: 'conflict', details: { currentVersion: 1 } });
  });

  it('refuses values outside what is allowed, and others than leads', async () => {
    const site = await createTestSite();
    const [lead, radiologist] = [await site.person('lead'), await site.person('radiologist')];
    await expect(editPolicy(as(lead), { expectedVersion: 0, form: { ...policyForm(), sureAt: 0.3 } })).rejects.toMatchObject({
      fields: { 'form.sureAt': '0.3 given; allowed: a number, 0.5 to 0.999' },
    });
    await expect(editPolicy(as(radiologist), { expectedVersion: 0, form: policyForm() })).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('the site', () => {
  it('is renamed by a lead, and its mask must be one', async () => {
    const site = await createTestSite();
    const [lead, coordinator] = [await site.person('lead'), await site.person('coordinator')];
    await editSite(as(lead), { name: 'Weavers Hill', accessionMask: 'WH-#####' });
    expect(await getSite(as(coordinator))).toEqual({ id: site.siteId, name: 'Weavers Hill', accessionMask: 'WH-#####' });
    await expect(editSite(as(lead), { name: 'X', accessionMask: '***' })).rejects.toMatchObject({ fields: { accessionMask: expect.stringContaining('up to two') } });
    await expect(editSite(as(coordinator), { name: 'X', accessionMask: '#' })).rejects.toMatchObject({ code: 'not-found' });
  });
});
