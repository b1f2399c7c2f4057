import { describe, expect, it } from 'vitest';
import { sliceExtent, slabWeightOf } from '@/lib/physics/fold/alias-family';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { tissueSolids } from '@/lib/physics/fold/tissue-sections';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { RangeMm } from '@/lib/physics/model/axes';
import type { SolidPart } from '@/lib/physics/model/patient';
import type { Prescription, Slab } from '@/lib/physics/model/prescription';
import { boxPart, samplePrescription, sampleProblem } from './sample-problem';

const slab = (changes: Partial<Slab> = {}): Slab => ({
  mode: 'slab',
  partitions: 32,
  partitionThicknessMm: 4,
  acquiredPartitions: 32,
  selective: false,
  droppedPartitionsPerEnd: 0,
  ...changes,
});
const unfolded = (slices: Slab, changes: Partial<Prescription> = {}): Prescription =>
  samplePrescription({
    slices,
    acceleration: {
      ...samplePrescription().acceleration,
      factorSlice: 2,
      unfolding: 'image-domain-grid-ends',
    },
    ...changes,
  });
const along = (zMm: RangeMm): SolidPart => boxPart('tissue', { xMm: [-100, 100], yMm: [-80, 80], zMm });

describe('a slab unfolded on a grid that ends at its acquired width', () => {
  // 32 partitions of 4 mm: from −64 to 64 mm.
  const isEnough = (zMm: RangeMm, centreZMm = 0, slices = slab()): boolean =>
    Number.isFinite(
      solveFold(sampleProblem([along(zMm)], unfolded(slices, { centreMm: [0, 0, centreZMm] }))).requirement(
        32,
      ).firstCleanMm,
    );

  it.each([
    [[-20, 60], 0, true],
    [[-60, 20], 0, true],
    [[-63, 63], 0, true],
    [[-20, 70], 0, false],
    [[-70, 20], 0, false],
    [[-20, 70], 10, true],
    [[-50, 60], 10, true],
    [[-60, 60], 10, false],
    [[-60, 20], -10, true],
    [[-20, 60], -10, false],
  ] as const)('tissue %j about a centre at %d mm: %s', (zMm, centreZMm, expected) => {
    expect(isEnough(zMm, centreZMm)).toBe(expected);
  });

  it('asks only of what is excited: an ideal selective slab reaches its nominal edges', () => {
    expect(isEnough([-200, 200], 0, slab({ selective: true }))).toBe(true);
    expect(isEnough([-200, 200])).toBe(false);
    const weight = slabWeightOf(sampleProblem([], unfolded(slab({ selective: true }))));
    expect([0, 63.9, -63.9, 64.1, -64.1].map(weight)).toEqual([1, 1, 1, 0, 0]);
  });

  it('needs no more than a margin can bring beyond it', () => {
    const withMargin = (superior: number, inferior: number) =>
      Number.isFinite(
        solveFold(
          sampleProblem([along([-55, 55])], unfolded(slab()), {
            marginMm: { right: 0, left: 0, anterior: 0, posterior: 0, superior, inferior },
          }),
        ).requirement(32).firstCleanMm,
      );
    expect(withMargin(7, 7)).toBe(true);
    expect(withMargin(15, 0)).toBe(false);
    expect(withMargin(0, 15)).toBe(false);
  });
});

describe('where a solid can exist along the slice axis', () => {
  const extentOf = (part: SolidPart) => {
    const problem = sampleProblem([part], unfolded(slab()));
    return sliceExtent(tissueSolids(problem, sectionFrame(problem.prescription, 0))[0]!, problem);
  };
  it('an ellipsoid ends at its poles, a prism at its ends, neither beyond the reach', () => {
    const ellipsoid = (z: number, half: number): SolidPart => ({
      name: 'head',
      kind: 'head',
      signalWeight: 1,
      estimated: false,
      shape: { type: 'ellipsoid', centreMm: [0, 0, z], semiAxesMm: [70, 90, half] },
    });
    expect(extentOf(ellipsoid(30, 80)).map((mm) => Math.round(mm * 1e6) / 1e6)).toEqual([-50, 110]);
    expect(extentOf(along([-30, 45]))).toEqual([-30, 45]);
    expect(extentOf(along([-3000, 3000]))).toEqual([-250, 250]);
  });
});
