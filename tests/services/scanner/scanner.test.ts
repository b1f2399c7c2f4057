import { beforeAll, describe, expect, it } from 'vitest';
import { archiveScanner, restoreScanner } from '@/lib/services/scanner/archive-scanner';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { editScanner } from '@/lib/services/scanner/edit-scanner';
import { getScanner } from '@/lib/services/scanner/get-scanner';
import { listScanners } from '@/lib/services/scanner/list-scanners';
import { as, equipSite, scannerForm, type EquippedSite } from '@/tests/support/equipped-site';

let here: EquippedSite;
let elsewhere: EquippedSite;
beforeAll(async () => {
  [here, elsewhere] = [await equipSite(), await equipSite()];
});

const auditOf = (id: string) =>
  here.site.withApp((trx) => trx.selectFrom('audit_event').selectAll().where('subject_id', '=', id).orderBy('at').execute());

describe('scanners', () => {
  it('a lead adds one, and everyone of the site reads it', async () => {
    const made = await createScanner(as(here.lead), scannerForm({ name: 'Room 2' }));
    expect(made).toMatchObject({ version: 1, archived: false, scanner: { name: 'Room 2' } });
    expect((await listScanners(as(here.radiographer))).map(({ scanner }) => scanner.name)).toEqual(['Room 2', 'Scanner A']);
    expect((await auditOf(made.id))[0]).toMatchObject({ action: 'scanner.edit', actor_id: here.lead.userId, fields: ['created'] });
  });

  it.each(['radiographer', 'coordinator', 'radiologist'] as const)('a %s may not', async (role) => {
    await expect(createScanner(as(here[role]), scannerForm({ name: 'Mine' }))).rejects.toMatchObject({ code: 'not-found' });
  });

  it('an edit is a new version that names its fields; the old one stays readable', async () => {
    const before = await createScanner(as(here.lead), scannerForm({ name: 'Room 3' }));
    const form = scannerForm({ name: 'Room 3', boreDiameterMm: 600, limits: { tableLimitKg: 180 } });
    const after = await editScanner(as(here.lead), { id: before.id, expectedVersion: 1, form });
    expect(after).toMatchObject({ version: 2, scanner: { boreDiameterMm: 600 } });
    expect((await getScanner(as(here.lead), { id: before.id, version: 1 })).scanner.boreDiameterMm).toBe(700);
    expect((await auditOf(before.id)).at(-1)!.fields).toEqual(['scanner.boreDiameterMm', 'scanner.limits.tableLimitKg']);
    expect((await editScanner(as(here.lead), { id: before.id, expectedVersion: 2, form })).version).toBe(2);
  });

  it('a stale edit is told the present version and changes nothing; of two at once one wins', async () => {
    const made = await createScanner(as(here.lead), scannerForm({ name: 'Room 4' }));
    const edit = (boreDiameterMm: number) =>
      editScanner(as(here.lead), { id: made.id, expectedVersion: 1, form: scannerForm({ name: 'Room 4', boreDiameterMm }) });
    const outcomes = await Promise.allSettled([edit(610), edit(620)]);
    expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    await expect(edit(630)).rejects.toMatchObject({ code: 'conflict', details: { currentVersion: 2 } });
    expect((await getScanner(as(here.lead), { id: made.id })).version).toBe(2);
  });

  it('a name is taken once in a site, and a form is refused field by field', async () => {
    await expect(createScanner(as(here.lead), scannerForm())).rejects.toMatchObject({ fields: { 'scanner.name': expect.stringContaining('is taken') } });
    await expect(
      createScanner(as(here.lead), scannerForm({ name: 'Room 9', limits: { tableLimitKg: -1 }, lineStep: { kind: 'doubling' } })),
    ).rejects.toMatchObject({ code: 'invalid', fields: { 'scanner.limits.tableLimitKg': '-1 given; allowed: a number, 50 to 500 kg' } });
  });

  it('an archived one leaves the list and can come back', async () => {
    const { id } = await createScanner(as(here.lead), scannerForm({ name: 'Room 5' }));
    await archiveScanner(as(here.lead), { id, expectedVersion: 1 });
    expect((await listScanners(as(here.lead))).map((each) => each.id)).not.toContain(id);
    expect((await listScanners(as(here.lead), { includeArchived: true })).map((each) => each.id)).toContain(id);
    expect((await restoreScanner(as(here.lead), { id, expectedVersion: 1 })).archived).toBe(false);
  });

  it('another site’s scanner is not there: not to read, not to change', async () => {
    const { id } = elsewhere.scanner;
    await expect(getScanner(as(here.lead), { id })).rejects.toMatchObject({ code: 'not-found' });
    await expect(editScanner(as(here.lead), { id, expectedVersion: 1, form: scannerForm() })).rejects.toMatchObject({ code: 'not-found' });
    await expect(archiveScanner(as(here.lead), { id, expectedVersion: 1 })).rejects.toMatchObject({ code: 'not-found' });
  });
});
