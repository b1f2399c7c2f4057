import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { partSolids } from '@/lib/physics/body/part-solids';
import { sectionFrame, toPatient } from '@/lib/physics/geometry/section-frame';
import type { PartShape, SolidPart } from '@/lib/physics/model/patient';
import { cutSolid, solidInSection } from '@/lib/physics/section/convex-solid';
import { crossings, maxOn, minOn, straight, valueAt, type Curve } from '@/lib/physics/section/curve';
import { bandsBetween } from '@/lib/physics/section/row-band';
import { samplePrescription } from '../fold/sample-problem';
import { runsOf } from '@/tests/support/tally';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true, noDefaultInfinity: true });
const arc = fc.record({
  offset: number(-100, 100),
  slope: number(-3, 3),
  // Eighths of a millimetre: a bulge of 1e-300 mm is no shape.
  bulge: fc.integer({ min: -1600, max: 1600 }).map((eighths) => eighths / 8),
  arcCentre: number(-50, 50),
  arcHalf: number(20, 200),
});

describe('curves', () => {
  it('extrema are those of dense sampling', () => {
    fc.assert(
      fc.property(arc, number(-0.99, 0.98), number(0.01, 1), (curve: Curve, from, share) => {
        const r0 = curve.arcCentre + from * curve.arcHalf;
        const r1 = r0 + share * (0.99 - from) * curve.arcHalf;
        let low = Infinity;
        let high = -Infinity;
        for (let i = 0; i <= 4000; i++) {
          const value = valueAt(curve, r0 + ((r1 - r0) * i) / 4000);
          low = Math.min(low, value);
          high = Math.max(high, value);
        }
        expect(maxOn(curve, r0, r1)).toBeGreaterThanOrEqual(high - 1e-9);
        expect(minOn(curve, r0, r1)).toBeLessThanOrEqual(low + 1e-9);
        // A step of 1/4000 of the range misses an apex by at most its curvature: far under 0.05 mm here.
        expect(maxOn(curve, r0, r1) - high).toBeLessThan(0.05);
        expect(low - minOn(curve, r0, r1)).toBeLessThan(0.05);
      }),
      { seed: 3, numRuns: runsOf(300) },
    );
  });

  it('crossings include every sign change', () => {
    fc.assert(
      fc.property(arc, number(-100, 100), number(-2, 2), (curve, offset, slope) => {
        const line = straight(offset, slope);
        const found = crossings(curve, line);
        let previous = NaN;
        const n = 2000;
        for (let i = 0; i <= n; i++) {
          const r = curve.arcCentre + curve.arcHalf * (-1 + (2 * i) / n);
          const difference = valueAt(curve, r) - valueAt(line, r);
          if (previous * difference < 0)
            expect(found.some((at) => Math.abs(at - r) <= (2 * curve.arcHalf) / n + 1e-6)).toBe(true);
          previous = difference;
        }
      }),
      { seed: 4, numRuns: runsOf(300) },
    );
  });

  it('parallel lines never cross, and shapes that only touch are empty', () => {
    expect(crossings(straight(1, 2), straight(3, 2))).toEqual([]);
    expect(bandsBetween([straight(0)], [straight(0)], 0, 10)).toEqual([]);
    expect(bandsBetween([straight(0)], [straight(5)], 3, 3)).toEqual([]);
    // A triangle: above 0, below r and 10 − r.
    const bands = bandsBetween([straight(0)], [straight(0, 1), straight(10, -1)], -50, 50);
    expect(bands.map(({ r0, r1 }) => [r0, r1])).toEqual([
      [0, 5],
      [5, 10],
    ]);
  });
});

/** Membership straight from the model's description, in patient coordinates. */
function inside(shape: PartShape, [x, y, z]: readonly [number, number, number]): boolean {
  const at = [x, y, z];
  if (shape.type === 'ellipsoid') {
    return (
      shape.semiAxesMm.reduce((sum, semi, i) => sum + ((at[i]! - shape.centreMm[i]!) / semi) ** 2, 0) < 1
    );
  }
  if (shape.type === 'outline-prism') return false;
  const axis = 'xyz'.indexOf(shape.along);
  if (at[axis]! >= (shape.toMm ?? 250) || at[axis]! <= (shape.fromMm ?? -250)) return false;
  const [u, v] = [0, 1, 2].filter((i) => i !== axis) as [number, number];
  const t = (((shape.rotationDeg ?? 0) * Math.PI) / 180) * (axis === 1 ? -1 : 1);
  const du = at[u]! - shape.centreMm[u]!;
  const dv = at[v]! - shape.centreMm[v]!;
  const a = (du * Math.cos(t) + dv * Math.sin(t)) / shape.semiAxesMm[0];
  const b = (dv * Math.cos(t) - du * Math.sin(t)) / shape.semiAxesMm[1];
  return a * a + b * b < 1;
}

const centre = fc.tuple(number(-60, 60), number(-60, 60), number(-60, 60));
const shape: fc.Arbitrary<PartShape> = fc.oneof(
  fc.record({
    type: fc.constant('ellipsoid' as const),
    centreMm: centre,
    semiAxesMm: fc.tuple(number(30, 200), number(30, 200), number(30, 200)),
  }),
  fc.record({
    type: fc.constant('elliptic-cylinder' as const),
    along: fc.constantFrom('x' as const, 'y' as const, 'z' as const),
    centreMm: centre,
    semiAxesMm: fc.tuple(number(30, 200), number(30, 200)),
    rotationDeg: fc.constantFrom(0, 90, 25, -70),
    fromMm: number(-200, -20),
    toMm: number(20, 200),
  }),
);
const frameOf = fc.record({
  plane: fc.constantFrom('axial' as const, 'coronal' as const, 'sagittal' as const),
  tilt1: fc.constantFrom(0, 0, 15, -40, 89),
  tilt2: fc.constantFrom(0, 0, 22, -35),
  turn: fc.constantFrom(0, 0, 33, 90),
  offset: number(-80, 80),
});
const PHASE = { axial: 'AP', coronal: 'SI', sagittal: 'SI' } as const;

describe('sections of solids', () => {
  it('hold exactly the points of the solid, whatever the plane', () => {
    fc.assert(
      fc.property(
        shape,
        frameOf,
        fc.array(fc.tuple(number(-250, 250), number(-250, 250)), { minLength: 60, maxLength: 60 }),
        (solidShape, f, points) => {
          const prescription = samplePrescription({
            plane: f.plane,
            phaseAxis: PHASE[f.plane],
            tiltAboutReadoutDeg: f.tilt1,
            tiltAboutPhaseDeg: f.tilt2,
            inPlaneRotationDeg: f.turn,
          });
          const frame = sectionFrame(prescription, f.offset);
          const part: SolidPart = {
            name: 'part',
            kind: 'other',
            shape: solidShape,
            signalWeight: 1,
            estimated: false,
          };
          const solids = partSolids(
            [part],
            { isocentreZMm: 10, tissueReachMm: 180 },
            { bands: [], b1Scale: 1, t1Ms: [1] },
            0,
          );
          const bands = solids.flatMap(({ solid }) => cutSolid(solidInSection(solid, frame), frame.sliceMm));
          for (const [r, p] of points) {
            const at = toPatient(frame, r, p);
            const expected = inside(solidShape, at) && Math.abs(at[2] - 10) < 180;
            const got = bands.some(
              (band) =>
                r > band.r0 && r < band.r1 && p > valueAt(band.lower, r) && p < valueAt(band.upper, r),
            );
            expect(got).toBe(expected);
          }
        },
      ),
      { seed: 9, numRuns: runsOf(400) },
    );
  });

  it('a turned ellipse has half-extent e = √((A cos t)² + (B sin t)²)', () => {
    for (const turn of [0, 15, 40, 90]) {
      const frame = sectionFrame(samplePrescription({ inPlaneRotationDeg: turn }));
      const part: SolidPart = {
        name: 'trunk',
        kind: 'trunk',
        shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [0, 0, 0], semiAxesMm: [200, 120] },
        signalWeight: 1,
        estimated: false,
      };
      const [solid] = partSolids(
        [part],
        { isocentreZMm: 0, tissueReachMm: 250 },
        { bands: [], b1Scale: 1, t1Ms: [1] },
        0,
      );
      const [band] = cutSolid(solidInSection(solid!.solid, frame), 0);
      const t = (turn * Math.PI) / 180;
      const half = Math.hypot(200 * Math.sin(t), 120 * Math.cos(t));
      // Closed forms of the same number: rounding only.
      expect(maxOn(band!.upper, band!.r0, band!.r1)).toBeCloseTo(half, 9);
    }
  });
});
