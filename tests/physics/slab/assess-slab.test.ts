import { describe, expect, it } from 'vitest';
import { fatWaterShiftHz, larmorFrequencyMhz } from '@/lib/physics/constants/larmor';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import { assessSlab, slabSkirts, slabSources } from '@/lib/physics/slab/assess-slab';
import { fatShiftShare } from '@/lib/physics/slab/fat-shift';
import { slabOf, typicalPrescription, typicalScanner } from '@/tests/support/physics-cases';

const scanner = typicalScanner({ fieldStrengthT: 3 });
const gradientEcho = typicalPrescription({ family: 'gradient-echo-3d', trMs: 4, flipDeg: 12 });
const everywhere = { tissue: { rangeMm: [-400, 400] as const }, keepClearMm: [-112, 112] as const };

describe('fat', () => {
  it('sits in a slab shifted by Δf·T_rf/TBW: 5.6 % at TBW 8, 1 ms, 3 T (Bernstein 2004, from memory)', () => {
    expect(fatShiftShare(3, 1, 8)).toBeCloseTo(0.056, 3);
  });
  it('resonates 223.5 Hz below water at 1.5 T and 447.1 Hz at 3 T (3.5 ppm)', () => {
    expect(fatWaterShiftHz(1.5)).toBeCloseTo(223.5, 1);
    expect(fatWaterShiftHz(3)).toBeCloseTo(447.1, 1);
    // CODATA 2018, from memory: 42.577 MHz/T.
    expect(larmorFrequencyMhz(1.5)).toBeCloseTo(63.866, 3);
    expect(larmorFrequencyMhz(0.5)).toBeCloseTo(21.289, 3);
    expect(() => larmorFrequencyMhz(Number.POSITIVE_INFINITY)).toThrow(
      expect.objectContaining({ code: 'field-strength-not-positive' }),
    );
  });
  it('is refused without a pulse duration or a field', () => {
    expect(() => fatShiftShare(3, 0, 8)).toThrow(
      expect.objectContaining({ code: 'pulse-duration-not-positive' }),
    );
    expect(() => fatShiftShare(3, 1, 0)).toThrow(
      expect.objectContaining({ code: 'time-bandwidth-out-of-range' }),
    );
    expect(() => fatShiftShare(-1, 1, 8)).toThrow(
      expect.objectContaining({ code: 'field-strength-not-positive' }),
    );
  });
  it('counts on the side its shift is known to be, on both when it is not', () => {
    const skirts = (fatShiftTowards?: 'low-end' | 'high-end') =>
      slabSkirts(slabSources(gradientEcho, slabOf({ fatShiftTowards }), scanner, DEFAULT_POLICY), 0.05);
    expect(skirts('high-end').high).toBeGreaterThan(skirts('high-end').low);
    expect(skirts('low-end').low).toBeCloseTo(skirts('high-end').high, 12);
    expect(skirts()).toEqual({ low: skirts('low-end').low, high: skirts('high-end').high });
  });
});

describe('a slab as prescribed', () => {
  it('takes the worse tissue: long T1 widens the skirt', () => {
    const sources = slabSources(
      gradientEcho,
      slabOf({ pulseDurationMs: undefined }),
      scanner,
      DEFAULT_POLICY,
    );
    expect(sources.map(({ tissue }) => tissue)).toEqual(['parenchyma', 'fat']);
    const [liver, fat] = sources.map(({ profile }) => profile.skirtShare(0.05));
    expect(liver).toBeGreaterThan(fat!);
    expect(slabSkirts(sources, 0.05)).toEqual({ low: liver, high: liver });
  });

  it('reports contaminated partitions, and adopting its answer leaves none in the keep-clear area', () => {
    const slab = slabOf();
    const now = assessSlab(gradientEcho, slab, scanner, DEFAULT_POLICY, everywhere);
    expect(now).toMatchObject({
      profileKind: 'spoiled',
      timeBandwidthProduct: 8,
      fatShiftShare: expect.closeTo(0.0559, 4) as number,
    });
    expect(now.contaminatedInKeepClear).toBeGreaterThan(0);
    expect(now.contaminated).toBe(now.partitions.filter(({ state }) => state === 'contaminated').length);
    const acquiredPartitions = now.smallestCleanPartitions!;
    const then = assessSlab(
      gradientEcho,
      { ...slab, acquiredPartitions },
      scanner,
      DEFAULT_POLICY,
      everywhere,
    );
    expect(then.contaminatedInKeepClear).toBe(0);
    const oneLess = assessSlab(
      gradientEcho,
      { ...slab, acquiredPartitions: acquiredPartitions - 1 },
      scanner,
      DEFAULT_POLICY,
      everywhere,
    );
    expect(oneLess.contaminatedInKeepClear).toBeGreaterThan(0);
  });

  it('adds partitions on the scanner’s step and within its largest oversampling', () => {
    const answer = (partitionStep: number, sliceOversamplingMaxPct = 100) =>
      assessSlab(
        gradientEcho,
        slabOf(),
        typicalScanner({ fieldStrengthT: 3, partitionStep, limits: { sliceOversamplingMaxPct } }),
        DEFAULT_POLICY,
        everywhere,
      ).smallestCleanPartitions;
    const free = answer(1)!;
    expect(answer(8)).toBe(64 + 8 * Math.ceil((free - 64) / 8));
    expect(answer(1, 5)).toBeUndefined();
  });

  it('uses the policy’s cautious sharpness when the pulse is unknown, and never does better for it', () => {
    const unknown = assessSlab(
      gradientEcho,
      slabOf({ timeBandwidthProduct: undefined, pulseDurationMs: undefined }),
      scanner,
      DEFAULT_POLICY,
      everywhere,
    );
    const known = assessSlab(
      gradientEcho,
      slabOf({ pulseDurationMs: undefined }),
      scanner,
      DEFAULT_POLICY,
      everywhere,
    );
    expect(unknown.timeBandwidthProduct).toBe(DEFAULT_POLICY.unknownTimeBandwidthProduct);
    expect(unknown.fatShiftShare).toBeUndefined();
    expect(unknown.contaminated).toBeGreaterThan(known.contaminated);
    expect(unknown.smallestCleanPartitions!).toBeGreaterThan(known.smallestCleanPartitions!);
  });

  it('a non-selective slab has no skirt’s end; an echo train is excited once, at 90°', () => {
    const flat = assessSlab(gradientEcho, slabOf({ selective: false }), scanner, DEFAULT_POLICY, everywhere);
    expect(flat).toMatchObject({ profileKind: 'non-selective', skirtShareLow: Number.POSITIVE_INFINITY });
    expect(flat.fatShiftShare).toBeUndefined();
    const train = typicalPrescription({ family: 'echo-train-spin-echo-3d', flipDeg: 180 });
    const slab = assessSlab(train, slabOf(), scanner, DEFAULT_POLICY, everywhere);
    expect(slab.profileKind).toBe('single-pulse');
    // Reference: TBW 8, 90°, 5 %: 0.1124 of the slab; fat's shift 0.0559 comes on top; ±0.005 as measured.
    expect(Math.abs(slab.skirtShareHigh - 0.1124 - 0.0559)).toBeLessThanOrEqual(0.005);
  });
});
