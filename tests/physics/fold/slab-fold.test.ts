import { describe, expect, it } from 'vitest';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { boxPart, ellipsePart, samplePrescription, sampleProblem } from './sample-problem';

const slab = (partitions: number, thickness: number, selective: boolean) => ({
  mode: 'slab' as const,
  partitions,
  partitionThicknessMm: thickness,
  acquiredPartitions: partitions,
  selective,
  droppedPartitionsPerEnd: 0,
});

describe('phase and slice folds together', () => {
  // Trunk |p| < 150, |z| < 100; arm p 200–260, z 150–250; W_y 360, W_z 300 (physics of 3D aliases, worked by hand).
  const trunk = boxPart('trunk', { xMm: [-100, 100], yMm: [-150, 150], zMm: [-100, 100] });
  const arm = boxPart('raised arm', { xMm: [-100, 100], yMm: [200, 260], zMm: [150, 250] });
  const prescription = samplePrescription({
    family: 'gradient-echo-3d',
    fovPhaseMm: 300,
    fovReadoutMm: 200,
    linesAcrossFov: 300,
    slices: slab(100, 2, false),
  });

  it('phase alone clean, slice alone clean, the diagonal not', () => {
    const solved = solveFold(sampleProblem([trunk, arm], prescription, { tissueReachMm: 260 }));
    expect(solved.isClean(360, 150)).toBe(false);
    const left = solved.leftover(360, 150);
    expect(left.from).toMatchObject({ part: 'raised arm', side: 'posterior' });
    expect(solved.isClean(360, 400)).toBe(true);
    expect(solved.isClean(600, 150)).toBe(true);
    // Each alone: without the diagonal neither direction folds anything.
    expect(solveFold(sampleProblem([trunk], prescription, { tissueReachMm: 260 })).isClean(360, 150)).toBe(
      true,
    );
    // (i, 0): the arm's own sections are not displayed; (0, j): its phase lies outside keep-clear.
    expect(solved.requirement(150).forbiddenMm.some(([low, high]) => low < 360 && 360 < high)).toBe(true);
  });

  it('the smallest clean partitions are found on the scanner’s step', () => {
    const solved = solveFold(
      sampleProblem([trunk, arm], prescription, { tissueReachMm: 260, partitionStep: 4 }),
    );
    // Arm 150–250 must not reach |z| < 100 from W_z away: W_z ≥ 350, 175 partitions of 2 mm, 176 in steps of 4.
    expect(solved.smallestCleanPartitions(360)).toBe(176);
    expect(solved.smallestCleanPartitions(600)).toBe(100 + 0);
    // The scanner's own most is still allowed, and one less than needed is not enough.
    const upTo = (acquiredPartitionsMax: number) =>
      solveFold(
        sampleProblem([trunk, arm], prescription, {
          tissueReachMm: 260,
          partitionStep: 4,
          acquiredPartitionsMax,
        }),
      ).smallestCleanPartitions(360);
    expect([upTo(176), upTo(175)]).toEqual([176, undefined]);
  });

  it('a non-selective slab sees all tissue within reach, an ideal slab none beyond its edges', () => {
    const body = ellipsePart('trunk', [0, 0], [240, 140]);
    const open = solveFold(sampleProblem([body], { ...prescription, slices: slab(50, 4, false) }));
    // Tissue ±250, keep-clear ±100 (centres ±98): W_z ≥ 348.
    expect(open.smallestCleanPartitions(300)).toBe(87);
    const ideal = solveFold(sampleProblem([body], { ...prescription, slices: slab(50, 4, true) }));
    expect(ideal.smallestCleanPartitions(300)).toBe(50);
  });

  it('a slab profile decides which ends are wrapped onto', () => {
    const body = ellipsePart('trunk', [0, 0], [240, 140]);
    // Bright to 30 mm beyond each edge of a 200 mm slab: W_z ≥ 98 + 130.
    const slabWeight = (offset: number) => (Math.abs(offset) < 130 ? 1 : 0.01);
    const solved = solveFold(
      sampleProblem([body], { ...prescription, slices: slab(50, 4, true) }, { slabWeight }),
    );
    expect(solved.smallestCleanPartitions(300)).toBe(57);
    const dropped = solveFold(
      sampleProblem(
        [body],
        { ...prescription, slices: { ...slab(50, 4, true), droppedPartitionsPerEnd: 3 } },
        { slabWeight },
      ),
    );
    // Without three partitions an end: W_z ≥ 86 + 130 = 216.
    expect(dropped.smallestCleanPartitions(300)).toBe(54);
    expect(solved.leftover(300, 50).displayedShare).toBeGreaterThan(0.5);
    expect(solved.leftover(300, 50).from).toMatchObject({
      side: expect.stringMatching(/superior|inferior/),
      distanceMm: 200,
    });
  });

  it('unfolding along the slab that ends at W_z needs all excited tissue inside: W_z ≥ S + 2·skirt', () => {
    const body = ellipsePart('trunk', [0, 0], [240, 140]);
    const slabWeight = (offset: number) => (Math.abs(offset) < 130 ? 1 : 0.01);
    const accelerated = {
      ...prescription,
      slices: slab(50, 4, true),
      acceleration: {
        ...prescription.acceleration,
        factorSlice: 2,
        unfolding: 'image-domain-grid-ends' as const,
      },
    };
    const solved = solveFold(sampleProblem([body], accelerated, { slabWeight }));
    expect(solved.smallestCleanPartitions(300)).toBe(65);
    expect(solved.leftover(300, 60).ghosts).toBe(true);
  });
});
