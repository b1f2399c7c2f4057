import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { displacements, type Interval } from '@/lib/physics/fold/displacement';
import { overSliceMargin, sectionAt, tissueSolids } from '@/lib/physics/fold/tissue-sections';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { PartShape, SolidPart } from '@/lib/physics/model/patient';
import { partSolids } from '@/lib/physics/body/part-solids';
import { cutSolid, solidInSection } from '@/lib/physics/section/convex-solid';
import { straight } from '@/lib/physics/section/curve';
import type { RowBand } from '@/lib/physics/section/row-band';
import { sliceRange } from '@/lib/physics/section/slice-range';
import { samplePrescription, sampleProblem } from './sample-problem';
import { runsOf } from '@/tests/support/tally';

const part = (shape: PartShape): SolidPart => ({
  name: 'part',
  kind: 'other',
  shape,
  signalWeight: 1,
  estimated: false,
});
const whole = (min: number, max: number) => fc.integer({ min, max });

const shape = fc.oneof(
  fc.record({
    type: fc.constant('elliptic-cylinder' as const),
    along: fc.constantFrom('x' as const, 'y' as const, 'z' as const),
    centreMm: fc.tuple(whole(-60, 60), whole(-60, 60), whole(-60, 60)),
    semiAxesMm: fc.tuple(whole(40, 220), whole(40, 220)),
    rotationDeg: fc.constantFrom(0, 20, -55),
    fromMm: whole(-200, -40),
    toMm: whole(40, 200),
  }),
  fc.record({
    type: fc.constant('ellipsoid' as const),
    centreMm: fc.tuple(whole(-60, 60), whole(-60, 60), whole(-60, 60)),
    semiAxesMm: fc.tuple(whole(40, 220), whole(40, 220), whole(40, 220)),
  }),
  fc.record({
    type: fc.constant('outline-prism' as const),
    along: fc.constantFrom('x' as const, 'z' as const),
    rings: fc.tuple(whole(40, 120), whole(40, 120), whole(2, 30)).map(([a, b, c]) => [
      [
        [-a, -40],
        [0, -b],
        [c, -b],
        [100, 20],
        [c, b],
        [-a, 30],
      ] as [number, number][],
    ]),
    fromMm: whole(-120, -20),
    toMm: whole(20, 120),
  }),
);

const plane = fc.record({
  plane: fc.constantFrom('axial' as const, 'coronal' as const, 'sagittal' as const),
  tiltAboutReadoutDeg: fc.constantFrom(0, 12, -30, 44),
  tiltAboutPhaseDeg: fc.constantFrom(0, 8, -25),
  inPlaneRotationDeg: fc.constantFrom(0, 17),
});

describe('tissue that may move across the slice', () => {
  it('gives the same extent as a dense search of the sections it may bring', () => {
    const rows: RowBand = { r0: -120, r1: 90, lower: straight(-40, 0.1), upper: straight(60) };
    fc.assert(
      fc.property(shape, plane, whole(-70, 70), whole(0, 15), whole(0, 15), (one, tilts, s, low, high) => {
        const prescription = samplePrescription({
          ...tilts,
          phaseAxis: tilts.plane === 'axial' ? 'AP' : 'SI',
        });
        const solids = tissueSolids(sampleProblem([part(one)], prescription), sectionFrame(prescription));
        const evaluate = (bands: readonly RowBand[]) => displacements(bands, [rows], [0, 0]);
        for (const solid of solids) {
          const got = overSliceMargin(solid, s, [low, high], evaluate);
          let dense: Interval | undefined;
          const n = 400;
          for (let i = 0; i <= n; i++) {
            const bands = sectionAt(solid, s - high + ((low + high) * i) / n);
            const here = bands.length ? evaluate(bands) : undefined;
            if (here) dense = dense ? [Math.min(dense[0], here[0]), Math.max(dense[1], here[1])] : here;
          }
          if (!dense) continue;
          expect(got).toBeDefined();
          // Never less than any section shows, but for the search's last third of a micrometre on a slope of 20.
          expect(got![0]).toBeLessThanOrEqual(dense[0] + 0.01);
          expect(got![1]).toBeGreaterThanOrEqual(dense[1] - 0.01);
          // Never more than a dense step (0.075 mm) on the steepest outline can hide.
          expect(got![0]).toBeGreaterThan(dense[0] - 3);
          expect(got![1]).toBeLessThan(dense[1] + 3);
        }
      }),
      { seed: 12, numRuns: runsOf(300) },
    );
  });

  it('what is already covered needs no search, and the answer stays inside it', () => {
    const prescription = samplePrescription({ tiltAboutReadoutDeg: 20 });
    const trunk = part({
      type: 'elliptic-cylinder',
      along: 'z',
      centreMm: [0, 0, 0],
      semiAxesMm: [240, 170],
    });
    const [solid] = tissueSolids(sampleProblem([trunk], prescription), sectionFrame(prescription));
    const rows: RowBand = { r0: -100, r1: 100, lower: straight(-50), upper: straight(50) };
    let calls = 0;
    const evaluate = (bands: readonly RowBand[]) => {
      calls++;
      return displacements(bands, [rows], [0, 0]);
    };
    const full = overSliceMargin(solid!, 0, [10, 10], evaluate)!;
    const searched = calls;
    calls = 0;
    const inside = overSliceMargin(solid!, 0, [10, 10], evaluate, [[-1000, 1000]])!;
    expect(calls).toBeLessThan(searched);
    expect(inside[1]).toBeLessThanOrEqual(full[1]);
  });

  it('the slice range of a bounded solid ends where its sections end', () => {
    fc.assert(
      fc.property(shape, plane, (one, tilts) => {
        fc.pre(one.type !== 'elliptic-cylinder');
        const prescription = samplePrescription({
          ...tilts,
          phaseAxis: tilts.plane === 'axial' ? 'AP' : 'SI',
        });
        const frame = sectionFrame(prescription);
        const reach = { isocentreZMm: 0, tissueReachMm: 900 };
        for (const { solid } of partSolids([part(one)], reach, { bands: [], b1Scale: 1, t1Ms: [1] }, 0)) {
          const turned = solidInSection(solid, frame);
          const [low, high] = sliceRange(turned);
          expect(high - low).toBeGreaterThan(0);
          expect(cutSolid(turned, low + 0.01).length).toBeGreaterThan(0);
          expect(cutSolid(turned, high - 0.01).length).toBeGreaterThan(0);
          expect(cutSolid(turned, low - 0.01)).toEqual([]);
          expect(cutSolid(turned, high + 0.01)).toEqual([]);
        }
      }),
      { seed: 13, numRuns: runsOf(200) },
    );
  });
});
