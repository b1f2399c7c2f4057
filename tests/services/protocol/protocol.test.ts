import { beforeAll, describe, expect, it } from 'vitest';
import { archiveProtocol } from '@/lib/services/protocol/archive-protocol';
import { createProtocol } from '@/lib/services/protocol/create-protocol';
import { editProtocol } from '@/lib/services/protocol/edit-protocol';
import { getProtocol } from '@/lib/services/protocol/get-protocol';
import { listProtocols } from '@/lib/services/protocol/list-protocols';
import { typicalPrescription } from '@/tests/support/physics-cases';
import { as, equipSite, sequences, type EquippedSite } from '@/tests/support/equipped-site';

let here: EquippedSite;
beforeAll(async () => {
  here = await equipSite();
});

const form = (name: string, list = sequences()) => ({
  name, region: 'abdomen', keepClearPreset: 'own',
  keepClear: { area: { kind: 'box', box: { xMm: [-100, 100], yMm: [-80, 80], zMm: [-60, 60] } }, followsWindow: false },
  sequences: list,
});

describe('protocols', () => {
  it('keep their sequences in order, version by version', async () => {
    const made = await createProtocol(as(here.lead), form('Liver'));
    expect(made.sequences.map(({ prescription }) => prescription.name)).toEqual(['First', 'Second']);
    const added = [...sequences().reverse(), typicalPrescription({ name: 'Third' })];
    const after = await editProtocol(as(here.lead), { id: made.id, expectedVersion: 1, form: form('Liver', added) });
    expect(after).toMatchObject({ version: 2 });
    expect(after.sequences.map(({ prescription }) => prescription.name)).toEqual(['Second', 'First', 'Third']);
    expect((await getProtocol(as(here.radiographer), { id: made.id, version: 1 })).sequences).toHaveLength(2);
    const list = await listProtocols(as(here.radiographer));
    expect(list.find(({ id }) => id === made.id)).toMatchObject({ name: 'Liver', version: 2, sequenceCount: 3 });
  });

  it('a stale edit changes nothing and says which version is there', async () => {
    const { id } = await createProtocol(as(here.lead), form('Kidneys'));
    await editProtocol(as(here.lead), { id, expectedVersion: 1, form: form('Kidneys', sequences().slice(0, 1)) });
    await expect(editProtocol(as(here.lead), { id, expectedVersion: 1, form: form('Kidneys') })).rejects.toMatchObject({
      code: 'conflict', details: { currentVersion: 2 },
    });
    expect((await getProtocol(as(here.lead), { id })).sequences).toHaveLength(1);
  });

  it('refuses a protocol without sequences, with one twice, and with one that contradicts itself', async () => {
    const twice = [typicalPrescription({ name: 'Same' }), typicalPrescription({ name: 'Same' })];
    await expect(createProtocol(as(here.lead), form('None', []))).rejects.toMatchObject({ fields: { sequences: expect.stringContaining('1 to 20 sequences') } });
    await expect(createProtocol(as(here.lead), form('Twice', twice))).rejects.toMatchObject({ fields: { 'sequences.1.name': expect.stringContaining('given twice') } });
    await expect(createProtocol(as(here.lead), form('Odd', [typicalPrescription({ phaseAxis: 'SI' })]))).rejects.toMatchObject({
      fields: { 'sequences.0.phaseAxis': 'SI given; allowed in the axial plane: RL, AP' },
    });
    expect((await listProtocols(as(here.lead))).map(({ name }) => name)).not.toContain('Odd');
  });

  it('only leads change them', async () => {
    await expect(createProtocol(as(here.radiographer), form('Mine'))).rejects.toMatchObject({ code: 'not-found' });
    const { id } = here.protocol;
    await expect(archiveProtocol(as(here.coordinator), { id, expectedVersion: 1 })).rejects.toMatchObject({ code: 'not-found' });
  });
});
