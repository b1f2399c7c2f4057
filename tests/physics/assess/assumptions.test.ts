import { describe, expect, it } from 'vitest';
import { assumptionsFor } from '@/lib/physics/assess/assumptions';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { isAccelerated } from '@/lib/physics/assess/resolve-unfolding';
import type { Case } from '@/lib/physics/model/case';
import {
  accelerated,
  extentsOf,
  measured,
  prescriptionOf,
  sketchCase,
  slabOf,
  stackOf,
  typicalPatient,
  typicalPolicy,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';

const fields = (given: Case) => assumptionsFor(freeze(given)).map(({ field }) => field);
const COIL = 'prescription.coil';
const UNFOLDING = 'prescription.acceleration.unfolding';

describe('what is accelerated', () => {
  it('is what leaves out lines, or partitions of a slab', () => {
    const slab = (factorPhase: number, factorSlice: number) =>
      isAccelerated(
        typicalPrescription({
          family: 'gradient-echo-3d',
          slices: slabOf(),
          acceleration: accelerated(factorPhase, { factorSlice }),
        }),
      );
    expect([slab(1, 1), slab(2, 1), slab(1, 2), slab(1, 1.2)]).toEqual([false, true, true, true]);
    const stack = (factorPhase: number, factorSlice: number) =>
      isAccelerated(
        typicalPrescription({
          slices: stackOf(20, 5),
          acceleration: accelerated(factorPhase, { factorSlice }),
        }),
      );
    // A stack has no partitions to leave out.
    expect([stack(1, 1), stack(1.2, 1), stack(1, 2)]).toEqual([false, true, false]);
  });
});

describe('assumptions named beside a verdict', () => {
  const unknown = typicalScanner({ unfolding: 'unknown' });
  it('unknown unfolding matters only to what is accelerated', () => {
    const of = (factorPhase: number) =>
      fields(
        sketchCase({
          scanner: unknown,
          prescription: typicalPrescription({
            acceleration: accelerated(factorPhase, { unfolding: 'unknown' }),
          }),
        }),
      );
    expect(of(2)).toContain(UNFOLDING);
    expect(of(1)).not.toContain(UNFOLDING);
    const slab = prescriptionOf('gradient-echo-3d', {
      acceleration: accelerated(1, { unfolding: 'unknown' }),
    });
    expect(fields(sketchCase({ scanner: unknown, prescription: slab }))).not.toContain(UNFOLDING);
    expect(
      fields(sketchCase({ prescription: typicalPrescription({ acceleration: accelerated(2) }) })),
    ).not.toContain(UNFOLDING);
  });
  it('the certainty asked for, as soon as a size has a spread and more than half is asked for', () => {
    const of = (spread: number, sureAt: number) =>
      fields(
        sketchCase({
          patient: typicalPatient({ extents: { ...extentsOf({}), left: measured(240, spread) } }),
          policy: typicalPolicy({ sureAt }),
        }),
      ).includes('policy.sureAt');
    expect([of(5, 0.9), of(5, 0.501), of(0.2, 0.9)]).toEqual([true, true, true]);
    expect([of(5, 0.5), of(0, 0.9)]).toEqual([false, false]);
  });
  it('breath-hold and breath period by policy only where the sequence asks for them', () => {
    const patient = typicalPatient({
      breathHoldS: { value: 15, source: 'policy-default', spread: 0 },
      breathPeriodS: { value: 4, source: 'policy-default', spread: 0 },
    });
    const of = (breathing: 'breath-hold' | 'triggered' | 'free', who = patient) =>
      fields(
        sketchCase({
          patient: who,
          prescription: typicalPrescription({
            breathing,
            ...(breathing === 'triggered' ? { breathsPerTr: 1 } : {}),
          }),
        }),
      );
    expect(of('breath-hold')).toEqual(['patient.breathHoldS', COIL]);
    expect(of('triggered')).toEqual(['patient.breathPeriodS', COIL]);
    expect(of('free')).toEqual([COIL]);
    expect(of('breath-hold', typicalPatient())).toEqual([COIL]);
  });
  it('a selective slab’s unknown pulse: its sharpness, and the shift of fat', () => {
    const of = (overrides: Parameters<typeof slabOf>[0]) =>
      fields(
        sketchCase({ prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf(overrides) }) }),
      ).filter((field) => field.startsWith('prescription.slices'));
    expect(of({})).toEqual([]);
    expect(of({ timeBandwidthProduct: undefined })).toEqual(['prescription.slices.timeBandwidthProduct']);
    expect(of({ pulseDurationMs: undefined })).toEqual(['prescription.slices.pulseDurationMs']);
    expect(of({ selective: false, timeBandwidthProduct: undefined, pulseDurationMs: undefined })).toEqual([]);
    expect(fields(sketchCase({ prescription: typicalPrescription() }))).toEqual([COIL]);
  });
  it('an unknown weight', () => {
    expect(fields(sketchCase({ patient: typicalPatient({ weightKg: undefined }) }))).toEqual([
      'patient.weightKg',
      COIL,
    ]);
  });
});
