import { describe, expect, it } from 'vitest';
import { asFamily, NEW_PROTOCOL, newSequence } from '@/components/protocol/sequence-defaults';
import { familyFields, sequenceSummary } from '@/components/protocol/sequence-facts';
import { FAMILIES, prescriptionSchema } from '@/lib/schemas/case/prescription';
import { protocolFormSchema } from '@/lib/schemas/protocol';

describe.each(FAMILIES)('a new %s sequence', (family) => {
  const fresh = { ...newSequence(family), name: 'Named' };

  it('lacks only its name', () => {
    expect(prescriptionSchema.safeParse(fresh).success).toBe(true);
    const { error } = prescriptionSchema.safeParse(newSequence(family));
    expect(error?.issues.map((issue) => issue.path.join('.'))).toEqual(['name']);
  });

  it.each(FAMILIES)('becomes a whole %s sequence in the same window', (other) => {
    const changed = asFamily(fresh, other);
    expect(prescriptionSchema.safeParse(changed).success).toBe(true);
    expect(changed).toMatchObject({
      name: 'Named',
      family: other,
      fovPhaseMm: fresh.fovPhaseMm,
      fovReadoutMm: fresh.fovReadoutMm,
      linesAcrossFov: fresh.linesAcrossFov,
      acquiredLines: fresh.acquiredLines,
      plane: fresh.plane,
    });
    // What the family does not have must not linger: it would count in the time.
    const fields = familyFields(other);
    if (!fields.train) expect(changed.echoTrainLength).toBe(1);
    if (!fields.echoPlanar) expect([changed.shots, changed.volumes]).toEqual([1, 1]);
    if (!fields.slab) expect(changed.acceleration.factorSlice).toBe(1);
    expect(changed.slices.mode).toBe(fields.slab ? 'slab' : 'stack');
  });
});

it('a new protocol lacks only names', () => {
  const { error } = protocolFormSchema.safeParse(NEW_PROTOCOL);
  expect(error?.issues.map((issue) => issue.path.join('.')).sort()).toEqual(['name', 'sequences.0.name']);
});

it('a sequence’s one line survives a form with holes in it', () => {
  expect(sequenceSummary(newSequence('gradient-echo-3d'))).toBe(
    'gradient echo 3D, axial, phase A–P · 300 × 400 mm, 192 × 256, 0 % oversampling, 300 mm acquired',
  );
  expect(sequenceSummary({ family: 'balanced', fovPhaseMm: null })).toContain('lines to be given');
});
