import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  aliasAt,
  partitionCentreMm,
  slabPartitions,
  slabPartitionsAt,
  smallestCleanPartitions,
} from '@/lib/physics/slab/contaminated-partitions';
import { slabProfile } from '@/lib/physics/slab/slab-profile';
import type { SlabProfile, SlabQuestion } from '@/lib/physics/slab/slab-types';
import { readPublished } from '@/tests/support/read-published';
import { runsOf } from '@/tests/support/tally';

const question = (profile: SlabProfile, overrides: Partial<SlabQuestion> = {}): SlabQuestion => ({
  partitions: 32,
  partitionThicknessMm: 4,
  acquiredPartitions: 32,
  sources: [{ tissue: 'parenchyma', profile, shiftShare: 0 }],
  tissue: { rangeMm: [-2000, 2000] },
  tolerance: 0.05,
  keepClearMm: [-64, 64],
  droppedPartitionsPerEnd: 0,
  ...overrides,
});
const single = (timeBandwidthProduct: number, flipDeg: number) =>
  slabProfile({ timeBandwidthProduct, flipDeg, kind: 'single-pulse' });
const NON_SELECTIVE = slabProfile({ timeBandwidthProduct: 0, flipDeg: 10, kind: 'non-selective' });

/** A slab with sharp edges and a flat, dim shelf beside it: every count can be done by hand. */
const shelf = (width: number): SlabProfile => ({
  kind: 'single-pulse',
  timeBandwidthProduct: 8,
  flipDeg: 10,
  at: (z) => (Math.abs(z) <= 0.5 ? 1 : Math.abs(z) <= 0.5 + width ? 0.3 : 0),
  skirtShare: () => width,
});

describe('contaminated partitions against fixtures/published/slab-partitions', () => {
  const rows = readPublished('slab-partitions');
  const ends = (list: readonly { readonly state: string }[]): [number, number] => {
    const half = list.length / 2;
    const count = (part: readonly { readonly state: string }[]): number =>
      part.filter(({ state }) => state === 'contaminated').length;
    return [count(list.slice(0, half)), count(list.slice(half))];
  };

  const isWhole = (acquired: number): boolean => Math.abs(acquired - Math.round(acquired)) < 1e-9;

  it('reads 432 rows; those at 0, 25 and 50 % are whole partitions', () => {
    expect(rows).toHaveLength(432);
    const whole = rows.filter((row) =>
      isWhole(row.number('partitions') * (1 + row.number('slice_oversampling_pct') / 100)),
    );
    expect(whole).toHaveLength(144);
  });

  for (const tbw of [4, 8, 12, 20]) {
    for (const flip of [10, 30, 90]) {
      it(`TBW ${tbw}, ${flip}°: within one partition per end (tolerance stated with the measurement)`, () => {
        const mine = rows.filter((row) => row.number('tbw') === tbw && row.number('flip_deg') === flip);
        expect(mine).toHaveLength(36);
        for (const row of mine) {
          const partitions = row.number('partitions');
          const s = row.number('slice_oversampling_pct') / 100;
          const acquired = partitions * (1 + s);
          const q = question(single(tbw, flip), {
            partitions,
            acquiredPartitions: partitions,
            tolerance: row.number('threshold_pct_of_plateau') / 100,
            tissue: { rangeMm: [-20_000, 20_000] },
          });
          const list = isWhole(acquired)
            ? slabPartitions({ ...q, acquiredPartitions: Math.round(acquired) })
            : slabPartitionsAt(q, s);
          const [low, high] = ends(list);
          expect(Math.abs(low - row.number('contaminated_low_end'))).toBeLessThanOrEqual(1);
          expect(Math.abs(high - row.number('contaminated_high_end'))).toBeLessThanOrEqual(1);
        }
      });
    }
  }
});

describe('alias into a partition', () => {
  it('is the sum of every other alias, weighted by tissue', () => {
    const source = { tissue: 'parenchyma' as const, profile: shelf(0.25), shiftShare: 0 };
    // S = 100, W_z = 110: z = 45 takes from −65 (shelf, 0.3); z = −45 from +65; z = 0 from ±110 (nothing).
    expect(aliasAt(45, 100, 110, source, { rangeMm: [-500, 500] })).toBeCloseTo(0.3, 12);
    expect(aliasAt(0, 100, 110, source, { rangeMm: [-500, 500] })).toBe(0);
    expect(aliasAt(45, 100, 110, source, { rangeMm: [-60, 500] })).toBe(0);
    expect(
      aliasAt(45, 100, 110, source, { rangeMm: [-500, 500], weightAt: (z) => (z < 0 ? 0.5 : 1) }),
    ).toBeCloseTo(0.15, 12);
  });

  it('a non-selective slab takes in tissue as far as the body reaches', () => {
    const q = question(NON_SELECTIVE, { tissue: { rangeMm: [-200, 90] } });
    // S = 128 = W_z: every multiple of 128 that lands in the tissue adds one.
    for (const { offsetMm, alias } of slabPartitions(q)) {
      expect(alias).toBe(
        [-256, -128, 128, 256].filter((w) => offsetMm + w <= 90 && offsetMm + w >= -200).length,
      );
    }
    expect(smallestCleanPartitions(q, { partitionStep: 1, mostPartitions: 128 })).toBe(
      // W_z must exceed 62 + 200 (partition centre at +62): 66 · 4 = 264.
      66,
    );
  });

  it('fat in a shifted slab makes the ends asymmetric, and asks for skirt + |Δz|/S', () => {
    const profile = single(8, 10);
    const fat = { tissue: 'fat' as const, profile, shiftShare: 0.056 };
    const water = { tissue: 'parenchyma' as const, profile, shiftShare: 0 };
    const counts = (q: SlabQuestion): [number, number] => {
      const list = slabPartitions(q);
      return [
        list.slice(0, 16).filter(({ state }) => state === 'contaminated').length,
        list.slice(16).filter(({ state }) => state === 'contaminated').length,
      ];
    };
    const [low, high] = counts(question(profile, { sources: [water, fat] }));
    // Fat reaches further beyond the high end, and that folds onto the low end.
    expect(low).toBeGreaterThan(high);
    expect([low, high]).toEqual(
      counts(question(profile, { sources: [water, { ...fat, shiftShare: -0.056 }] })).reverse(),
    );
    const clean = smallestCleanPartitions(question(profile, { sources: [water, fat] }), {
      partitionStep: 1,
      mostPartitions: 64,
    })!;
    const needed = profile.skirtShare(0.05) + 0.056;
    // Partition centres sit half a partition inside the edge, and L_z is whole: at most one partition less.
    expect(clean).toBeLessThanOrEqual(Math.ceil(32 * (1 + needed)));
    expect(clean).toBeGreaterThanOrEqual(Math.floor(32 * (1 + needed)) - 1);
  });

  it('reports dim and bright partitions apart from wrap', () => {
    const spoiled = slabProfile({
      timeBandwidthProduct: 8,
      flipDeg: 20,
      kind: 'spoiled',
      trMs: 4,
      t1Ms: 800,
    });
    const list = slabPartitions(question(spoiled, { acquiredPartitions: 64 }));
    expect(list.every(({ state }) => state === 'clean')).toBe(true);
    expect(list.some(({ bright, signal }) => bright && signal > 1.1)).toBe(true);
    const single10 = slabPartitions(question(single(4, 10), { acquiredPartitions: 64 }));
    expect(single10[0]).toMatchObject({ dim: true, bright: false });
    expect(single10[16]).toMatchObject({ dim: false, bright: false, signal: expect.closeTo(1, 2) as number });
  });

  it('exactly at a limit is neither dim, bright nor contaminated', () => {
    const at = (share: number): SlabProfile => ({ ...shelf(0), at: (z) => (Math.abs(z) <= 0.5 ? share : 0) });
    const own = (share: number) => slabPartitions(question(at(share)))[0]!;
    expect([own(0.9), own(0.899999)].map(({ dim }) => dim)).toEqual([false, true]);
    expect([own(1.1), own(1.100001)].map(({ bright }) => bright)).toEqual([false, true]);
    const wrap = (tolerance: number) =>
      slabPartitions(question(shelf(0.5), { tolerance, acquiredPartitions: 40 }))[0]!.state;
    expect([wrap(0.3), wrap(0.299999)]).toEqual(['clean', 'contaminated']);
  });

  it('keep-clear is the partitions that overlap its range, less the ends given up', () => {
    const inside = (overrides: Partial<SlabQuestion>): number[] =>
      slabPartitions(question(single(8, 10), { partitions: 8, acquiredPartitions: 8, ...overrides }))
        .filter(({ inKeepClear }) => inKeepClear)
        .map(({ index }) => index);
    // Partitions are [−16, −12], …, [12, 16].
    expect(inside({ keepClearMm: [-8, 4] })).toEqual([2, 3, 4]);
    expect(inside({ keepClearMm: [-8.5, 4.5] })).toEqual([1, 2, 3, 4, 5]);
    expect(inside({ keepClearMm: [-16, 16], droppedPartitionsPerEnd: 2 })).toEqual([2, 3, 4, 5]);
    expect(inside({ keepClearMm: undefined })).toEqual([]);
  });
});

describe('smallest slice oversampling', () => {
  it('is the first whole L_z on the step with every keep-clear partition clean, as trying each says', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(4, 6, 8, 12),
        fc.constantFrom(10, 30, 90),
        fc.integer({ min: 8, max: 40 }),
        fc.integer({ min: 1, max: 4 }),
        fc.integer({ min: 0, max: 3 }),
        fc.constantFrom(0.02, 0.05, 0.1),
        (tbw, flip, partitions, partitionStep, droppedPartitionsPerEnd, tolerance) => {
          const q = question(single(tbw, flip), {
            partitions,
            acquiredPartitions: partitions,
            droppedPartitionsPerEnd,
            tolerance,
          });
          const answer = smallestCleanPartitions(q, { partitionStep, mostPartitions: 3 * partitions });
          let expected: number | undefined;
          for (let l = partitions; l <= 3 * partitions && expected === undefined; l += partitionStep) {
            const list = slabPartitions({ ...q, acquiredPartitions: l });
            if (list.every(({ inKeepClear, state }) => !inKeepClear || state === 'clean')) expected = l;
          }
          expect(answer).toBe(expected);
        },
      ),
      { seed: 20262, numRuns: runsOf(60) },
    );
  });

  it('never asks for more when partitions are given up, the tolerance grows, or tissue ends sooner', () => {
    const base = question(single(6, 10));
    const grid = { partitionStep: 1, mostPartitions: 96 };
    const least = (overrides: Partial<SlabQuestion>): number =>
      smallestCleanPartitions({ ...base, ...overrides }, grid)!;
    let previous = Number.POSITIVE_INFINITY;
    for (const droppedPartitionsPerEnd of [0, 1, 2, 3, 4]) {
      expect(least({ droppedPartitionsPerEnd })).toBeLessThanOrEqual(previous);
      previous = least({ droppedPartitionsPerEnd });
    }
    expect(least({ tolerance: 0.1 })).toBeLessThan(least({ tolerance: 0.01 }));
    expect(least({ tissue: { rangeMm: [-64, 64] } })).toBe(32);
  });

  it('is undefined when the scanner cannot add enough', () => {
    expect(
      smallestCleanPartitions(question(NON_SELECTIVE), { partitionStep: 1, mostPartitions: 64 }),
    ).toBeUndefined();
  });

  it('does not change when slab, tissue and keep-clear are scaled together', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.3, max: 3, noNaN: true }), (scale) => {
        const q = question(single(8, 15));
        const scaled = question(single(8, 15), {
          partitionThicknessMm: 4 * scale,
          tissue: { rangeMm: [-2000 * scale, 2000 * scale] },
          keepClearMm: [-64 * scale, 64 * scale],
        });
        const grid = { partitionStep: 1, mostPartitions: 64 };
        expect(smallestCleanPartitions(scaled, grid)).toBe(smallestCleanPartitions(q, grid));
      }),
      { seed: 20263, numRuns: runsOf(30) },
    );
  });
});

describe('slab questions that make no sense', () => {
  const q = question(single(8, 10));
  it.each([
    [{ acquiredPartitions: 31 }, 'partitions-not-whole', 'acquiredPartitions'],
    [{ partitions: 31.5 }, 'partitions-not-whole', 'partitions'],
    [{ partitionThicknessMm: 0 }, 'thickness-not-positive', 'partitionThicknessMm'],
    [{ tolerance: 0 }, 'tolerance-out-of-range', 'tolerance'],
    [{ sources: [] }, 'no-source', 'sources'],
    [{ tissue: { rangeMm: [5, -5] as const } }, 'tissue-range-invalid', 'tissue.rangeMm'],
    [{ droppedPartitionsPerEnd: -1 }, 'partitions-not-whole', 'droppedPartitionsPerEnd'],
  ])('refuses %o', (overrides, code, argument) => {
    expect(() => slabPartitions({ ...q, ...overrides })).toThrow(expect.objectContaining({ code, argument }));
  });
  it('refuses a negative oversampling and a step that is not whole', () => {
    expect(() => slabPartitionsAt(q, -0.1)).toThrow(
      expect.objectContaining({ code: 'oversampling-negative' }),
    );
    expect(() => smallestCleanPartitions(q, { partitionStep: 0.5, mostPartitions: 64 })).toThrow(
      expect.objectContaining({ code: 'partition-step-not-whole' }),
    );
  });
});

it('partition centres are symmetric about the slab centre', () => {
  expect([0, 1, 2, 3].map((i) => partitionCentreMm(i, 4, 2))).toEqual([-3, -1, 1, 3]);
});
