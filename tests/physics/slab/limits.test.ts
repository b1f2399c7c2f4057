import { describe, expect, it } from 'vitest';
import {
  slabPartitions,
  slabPartitionsAt,
  smallestCleanPartitions,
} from '@/lib/physics/slab/contaminated-partitions';
import { mostPartitions } from '@/lib/physics/slab/assess-slab';
import { SINGLE_PULSE_SKIRT_RULE, transitionProduct } from '@/lib/physics/slab/skirt-rules';
import { slabProfile } from '@/lib/physics/slab/slab-profile';
import type { SlabQuestion } from '@/lib/physics/slab/slab-types';
import { expectLimits } from '@/tests/support/expect-limits';
import { slabOf, typicalScanner } from '@/tests/support/physics-cases';
import { readPublished } from '@/tests/support/read-published';

const profile = slabProfile({ timeBandwidthProduct: 8, flipDeg: 10, kind: 'single-pulse' });
const question = (overrides: Partial<SlabQuestion>): SlabQuestion => ({
  partitions: 4,
  partitionThicknessMm: 4,
  acquiredPartitions: 4,
  sources: [{ tissue: 'parenchyma', profile, shiftShare: 0 }],
  tissue: { rangeMm: [-50, 50] },
  tolerance: 0.05,
  droppedPartitionsPerEnd: 0,
  ...overrides,
});

describe('what a slab may be', () => {
  it('time-bandwidth product 1 to 40, threshold 0.1 to 90 %, ripple 0.001 to 10 %', () => {
    expectLimits(
      (tbw) => slabProfile({ timeBandwidthProduct: tbw, flipDeg: 10, kind: 'single-pulse' }),
      'time-bandwidth-out-of-range',
      1,
      40,
    );
    expectLimits((threshold) => profile.skirtShare(threshold), 'threshold-out-of-range', 0.001, 0.9);
    expectLimits((ripple) => transitionProduct(ripple, 0.01), 'ripple-out-of-range', 1e-5, 0.1);
    expectLimits((ripple) => transitionProduct(0.01, ripple), 'ripple-out-of-range', 1e-5, 0.1);
  });
  it('flip above 0 to 150°; TR and T1 finite and above 0', () => {
    const flip = (flipDeg: number) => () =>
      slabProfile({ timeBandwidthProduct: 8, flipDeg, kind: 'single-pulse' });
    expect(flip(1e-3)).not.toThrow();
    expect(flip(150)).not.toThrow();
    for (const bad of [0, 150.001, Number.NaN])
      expect(flip(bad)).toThrow(expect.objectContaining({ code: 'flip-out-of-range' }));
    const spoiled = (trMs: number, t1Ms: number) => () =>
      slabProfile({ timeBandwidthProduct: 8, flipDeg: 10, kind: 'spoiled', trMs, t1Ms });
    for (const bad of [0, Number.POSITIVE_INFINITY]) {
      expect(spoiled(bad, 800)).toThrow(expect.objectContaining({ code: 'tr-not-positive' }));
      expect(spoiled(4, bad)).toThrow(expect.objectContaining({ code: 't1-not-positive' }));
    }
  });
  it('tissue ends somewhere, tolerance lies between 0 and 1', () => {
    const at = (overrides: Partial<SlabQuestion>) => () => slabPartitions(question(overrides));
    expect(at({ tissue: { rangeMm: [5, 5] } })).not.toThrow();
    for (const rangeMm of [
      [Number.NEGATIVE_INFINITY, 5],
      [5, Number.POSITIVE_INFINITY],
      [Number.NaN, 5],
      [6, 5],
    ] as const) {
      expect(at({ tissue: { rangeMm } })).toThrow(expect.objectContaining({ code: 'tissue-range-invalid' }));
    }
    for (const tolerance of [0, 1, Number.NaN])
      expect(at({ tolerance })).toThrow(expect.objectContaining({ code: 'tolerance-out-of-range' }));
    expect(at({ partitions: 1, acquiredPartitions: 1 })).not.toThrow();
    expect(at({ partitions: 0, acquiredPartitions: 0 })).toThrow(
      expect.objectContaining({ code: 'partitions-not-whole' }),
    );
    expect(at({ partitionThicknessMm: Number.POSITIVE_INFINITY })).toThrow(
      expect.objectContaining({ code: 'thickness-not-positive' }),
    );
    expect(() => slabPartitionsAt(question({}), Number.POSITIVE_INFINITY)).toThrow(
      expect.objectContaining({ code: 'oversampling-negative' }),
    );
    expect(() => slabPartitionsAt(question({}), 0)).not.toThrow();
  });
  it('the last width tried is the scanner’s largest', () => {
    const q = question({ keepClearMm: [-8, 8] });
    const least = smallestCleanPartitions(q, { partitionStep: 1, mostPartitions: 12 })!;
    expect(least).toBeGreaterThan(4);
    expect(smallestCleanPartitions(q, { partitionStep: 1, mostPartitions: least })).toBe(least);
    expect(smallestCleanPartitions(q, { partitionStep: 1, mostPartitions: least - 1 })).toBeUndefined();
    expect(() => smallestCleanPartitions(q, { partitionStep: 0, mostPartitions: 12 })).toThrow(
      expect.objectContaining({ code: 'partition-step-not-whole' }),
    );
  });
  it('skirts are read to a part in a million of the slab', () => {
    for (const threshold of [0.01, 0.05, 0.5]) {
      const edge = 0.5 + profile.skirtShare(threshold);
      if (profile.skirtShare(threshold) > 0) expect(profile.at(edge)).toBeCloseTo(threshold, 5);
    }
    // Half the plateau lies at the nominal edge: no skirt beyond it at 90 %.
    expect(profile.skirtShare(0.9)).toBe(0);
  });
});

describe('whole partitions and rules of thumb', () => {
  it('the most a scanner takes is its percentage of the slab, a whole result kept whole', () => {
    // 50 · 1.1, 30 · 1.1 and 70 · 1.15 are off by the last bits of a double.
    for (const [partitions, percent, expected] of [
      [50, 10, 55],
      [30, 10, 33],
      [70, 15, 80],
      [60, 15, 69],
      [40, 33, 53],
      [64, 0, 64],
    ] as const)
      expect(
        mostPartitions(
          slabOf({ partitions }),
          typicalScanner({ limits: { sliceOversamplingMaxPct: percent } }),
        ),
      ).toBe(expected);
  });
  it('k of skirt ≈ k/TBW is the measured mean at 10°, to the two decimals it is given in', () => {
    const rows = readPublished('slab-profile').filter((row) => row.number('flip_deg') === 10);
    for (const percent of [1, 2, 5, 10] as const) {
      const ks = rows.map((row) => row.number('tbw') * row.number(`skirt_${percent}pct`));
      const mean = ks.reduce((sum, k) => sum + k, 0) / ks.length;
      expect(Math.abs(SINGLE_PULSE_SKIRT_RULE[percent] - mean)).toBeLessThan(0.005);
    }
  });
});
